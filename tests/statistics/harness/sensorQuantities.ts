import { moments } from '#shared/statistics/description/moments.ts'
import { allanDeviation } from '#shared/statistics/sensor/allanDeviation.ts'
import { allanMinimum } from '#shared/statistics/sensor/allanMinimum.ts'
import { backCalculated } from '#shared/statistics/sensor/backCalculated.ts'
import {
  type CalibrationLine,
  type CalibrationWeights,
  calibrationLine,
  type Standards,
} from '#shared/statistics/sensor/calibrationLine.ts'
import { type DetectionLimit, detectionLimits } from '#shared/statistics/sensor/detectionLimits.ts'
import { inversePrediction } from '#shared/statistics/sensor/inversePrediction.ts'
import { limitOfBlank } from '#shared/statistics/sensor/limitOfBlank.ts'
import type { Actual } from './compare.ts'
import { completePairs } from './completePairs.ts'
import type { Quantities, Surroundings } from './Quantity.ts'

export const sensorQuantities: Quantities = {
  'calibration_*': (s) => calibrated(lineOf(s)),
  'back_calculated_*': (s) =>
    backCalculated(standardsOf(s), lineOf(s)).map((at) => ({
      level: at.level,
      mean_back_calculated: at.mean,
      mean_relative_error_percent: at.relativeErrorPercent,
    })),
  'lod_loq_*': (s) => {
    const limits = detectionLimits(lineOf(s), moments(blanksOf(s).blanks).sd)
    return {
      residual_sd: limit(limits.fromResidualSd),
      sd_of_blanks: limit(limits.fromBlanks!),
      se_of_intercept: limit(limits.fromInterceptError),
    }
  },
  lob_lod_classical: (s) => {
    const { blanks, low, lowLevel } = blanksOf(s)
    const answer = limitOfBlank(blanks, low)
    const { intercept, slope } = calibrationLine(standardsOf(s))
    const ppb = (signal: number) => (signal - intercept) / slope
    return {
      n_blank: answer.blank.n,
      mean_blank: answer.blank.mean,
      sd_blank: answer.blank.sd,
      n_low: answer.low.n,
      low_level_ppb: lowLevel,
      mean_low: answer.low.mean,
      sd_low: answer.low.sd,
      lob_signal: answer.limitOfBlank,
      lod_signal: answer.limitOfDetection,
      lob_ppb: ppb(answer.limitOfBlank),
      lod_ppb: ppb(answer.limitOfDetection),
      lob_signal_full_z: answer.limitOfBlankFullZ,
      lod_signal_full_z: answer.limitOfDetectionFullZ,
      lod_signal_small_sample: answer.limitOfDetectionSmallSample,
      lod_ppb_small_sample: ppb(answer.limitOfDetectionSmallSample),
      blank_percentile_95_type7: answer.blank.percentile95,
    }
  },
  inverse_prediction: (s) => {
    const meanSignal = Number(s.given.mean_signal)
    const readings = Number(s.given.readings)
    const answer = inversePrediction(calibrationLine(standardsOf(s)), { meanSignal, readings })
    return {
      mean_signal: meanSignal,
      readings,
      level: answer.level,
      se: answer.standardError,
      approx_ci95: answer.approximate,
      fieller_ci95: answer.fieller,
    }
  },
  overlapping_allan_deviation: (s) => allan(s, true),
  allan_deviation_not_overlapping: (s) => allan(s, false),
  allan_minimum: (s) => {
    const { m, tauS, deviation } = allanMinimum(allanDeviation(seriesOf(s)))
    return { m, tau: tauS, deviation }
  },
}

/** "signal ~ level" names the columns; other markers of the table use its own first such pair. */
function standardsOf({ record, table }: Surroundings): Standards {
  const whole = table(record.dataset)
  const named = record.marker.split(' ~ ')
  const [signal, level] =
    named.length === 2
      ? named
      : ['signal', 'level'].map((start) => whole.columns.find((name) => name.startsWith(start))!)
  const { first, second } = completePairs(whole.numbers(level!), whole.numbers(signal!))
  return { levels: first, signals: second }
}

function lineOf(s: Surroundings): CalibrationLine {
  const { quantity } = s.record
  const weights: CalibrationWeights = quantity.endsWith('1_over_x2')
    ? '1/x²'
    : quantity.endsWith('1_over_x')
      ? '1/x'
      : 'none'
  return calibrationLine(standardsOf(s), { weights })
}

/** The blanks that belong to gas-standards-k are gas-blanks-k. */
function blanksOf({ record, table }: Surroundings) {
  const whole = table(record.dataset.replace('standards', 'blanks'))
  const signal = whole.columns.find((name) => name.startsWith('signal'))!
  const level = whole.columns.find((name) => name.startsWith('level'))!
  const ofKind = (kind: string) => whole.where((row) => row.kind === kind)
  const known = (values: (number | null)[]) => values.filter((value) => value !== null)
  return {
    blanks: known(ofKind('blank').numbers(signal)),
    low: known(ofKind('low').numbers(signal)),
    lowLevel: ofKind('low').numbers(level)[0] ?? null,
  }
}

function calibrated(line: CalibrationLine): Actual {
  const { lackOfFit } = line
  return {
    n: line.n,
    intercept: line.intercept,
    intercept_se: line.interceptStandardError,
    intercept_ci95: line.interceptInterval,
    slope: line.slope,
    slope_se: line.slopeStandardError,
    slope_ci95: line.slopeInterval,
    residual_sd: line.residualSd,
    residual_df: line.degreesOfFreedom,
    r_squared: line.rSquared,
    pearson_r_of_x_y: line.pearsonR,
    covariance_intercept_slope: line.covariance,
    lack_of_fit: lackOfFit && {
      ss_lack_of_fit: lackOfFit.sumSquaresLackOfFit,
      df1: lackOfFit.df1,
      ss_pure_error: lackOfFit.sumSquaresPureError,
      df2: lackOfFit.df2,
      f: lackOfFit.f,
      p: lackOfFit.p,
    },
  }
}

function limit({ sigma, detection, quantitation }: DetectionLimit): Actual {
  return { sigma, lod: detection, loq: quantitation }
}

function seriesOf({ record, table }: Surroundings): number[] {
  return table(record.dataset)
    .numbers(record.marker)
    .filter((value) => value !== null)
}

function allan(s: Surroundings, overlapping: boolean): Actual {
  const readings = seriesOf(s)
  const intervalS = Number(s.given.tau0 ?? 1)
  const lengths = s.given.m as number[]
  const points = allanDeviation(readings, { intervalS, overlapping, lengths })
  return {
    n: readings.length,
    tau0: intervalS,
    m: points.map((point) => point.m),
    tau: points.map((point) => point.tauS),
    deviation: points.map((point) => point.deviation),
    terms: points.map((point) => point.terms),
  }
}
