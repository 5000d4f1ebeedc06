import { pearson } from '../agreement/pearson.ts'
import { fUpperTail } from '../distributions/fUpperTail.ts'
import type { LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { type LeastSquares, leastSquares } from '../regression/leastSquares.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type CalibrationWeights = 'none' | '1/x' | '1/x²'

/** Gas standards: certified level and signal of each reading, one unit for all levels. */
export type Standards = { levels: ArrayLike<number>; signals: ArrayLike<number> }

export type LackOfFit = {
  sumSquaresLackOfFit: number
  df1: number
  sumSquaresPureError: number
  df2: number
  f: number
  p: number
}

export type CalibrationLine = LeastSquares & {
  weights: CalibrationWeights
  /** Plain correlation of level and signal; null where the signal never varies. */
  pearsonR: number | null
  /** Null without replicates, or with fewer than three levels. */
  lackOfFit: LackOfFit | null
  lackOfFitNotDefined: NotDefined | null
}

/**
 * Calibration line of signal on level, unweighted or weighted by 1/level or 1/level² where the error
 * grows with the level, with a test for lack of fit.
 * @param standards n ≥ 3 readings at 2 or more levels; weighting needs levels above 0
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'constant', 'not-positive'
 * Source: Miller & Miller 2010, Statistics and Chemometrics for Analytical Chemistry, ch. 5; lack of fit
 * Draper & Smith 1998, section 2.1.
 */
export function calibrationLine(
  { levels, signals }: Standards,
  { weights = 'none', level = 0.95 }: LevelOption & { weights?: CalibrationWeights } = {},
): CalibrationLine {
  const w = weights === 'none' ? undefined : Float64Array.from(levels, (x) => weightOf(x, weights))
  const line = leastSquares(levels, signals, w, { level })
  const lackOfFit = lackOfFitTest(levels, signals, w, line)
  return {
    ...line,
    weights,
    pearsonR: correlation(levels, signals),
    lackOfFit,
    lackOfFitNotDefined: lackOfFit
      ? null
      : {
          code: 'too-few',
          sentence: 'Lack of fit needs at least three levels and repeated readings that differ.',
        },
  }
}

function weightOf(x: number, weights: CalibrationWeights): number {
  if (!(x > 0)) {
    throw new StatisticsError(
      'not-positive',
      'Weights of 1/x need levels above 0: use the unweighted line or leave out the zero standard.',
    )
  }
  return weights === '1/x' ? 1 / x : 1 / (x * x)
}

function correlation(first: ArrayLike<number>, second: ArrayLike<number>): number | null {
  const varies = Array.from(second).some((value) => value !== second[0])
  return varies ? pearson({ first, second }).r : null
}

function lackOfFitTest(
  levels: ArrayLike<number>,
  signals: ArrayLike<number>,
  weights: Float64Array | undefined,
  line: LeastSquares,
): LackOfFit | null {
  const byLevel = new Map<number, { signals: number[]; weight: number }>()
  for (let i = 0; i < levels.length; i++) {
    const group = byLevel.get(levels[i]!) ?? { signals: [], weight: weights ? weights[i]! : 1 }
    group.signals.push(signals[i]!)
    byLevel.set(levels[i]!, group)
  }
  const df1 = byLevel.size - 2
  const df2 = line.n - byLevel.size
  if (df1 < 1 || df2 < 1) return null
  let pureError = 0
  let lack = 0
  for (const [x, group] of byLevel) {
    const mean = group.signals.reduce((a, b) => a + b, 0) / group.signals.length
    const fitted = line.meanY + line.slope * (x - line.meanX)
    pureError += group.weight * group.signals.reduce((s, y) => s + (y - mean) ** 2, 0)
    lack += group.weight * group.signals.length * (mean - fitted) ** 2
  }
  if (pureError === 0) return null
  const f = lack / df1 / (pureError / df2)
  return {
    sumSquaresLackOfFit: lack,
    df1,
    sumSquaresPureError: pureError,
    df2,
    f,
    p: fUpperTail(f, df1, df2),
  }
}
