import { binormalArea } from '#shared/statistics/accuracy/binormalArea.ts'
import { binormalCurve } from '#shared/statistics/accuracy/binormalCurve.ts'
import { bootstrapArea } from '#shared/statistics/accuracy/bootstrapArea.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { hanleyMcNeilError } from '#shared/statistics/accuracy/hanleyMcNeilError.ts'
import { independentAreas } from '#shared/statistics/accuracy/independentAreas.ts'
import { mannWhitney } from '#shared/statistics/accuracy/mannWhitney.ts'
import { pairedDelong } from '#shared/statistics/accuracy/pairedDelong.ts'
import { partialArea } from '#shared/statistics/accuracy/partialArea.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { testAgainstHalf } from '#shared/statistics/accuracy/testAgainstHalf.ts'
import { venkatramanTest } from '#shared/statistics/accuracy/venkatramanTest.ts'
import { summariseValues } from '#shared/statistics/description/summariseValues.ts'
import { type Actual, NOT_COMPARED } from './compare.ts'
import { orNull } from './orNull.ts'
import type { Quantities, Surroundings } from './Quantity.ts'
import { classesIn, classesOf, completeRows, curveOf, directionsOf } from './rocInput.ts'

/** Any seed will do: the tolerance of a Monte Carlo value holds for nearly all of them. */
const SEED = 20260101

export const areaQuantities: Quantities = {
  descriptives: (s) => {
    const { present, absent } = classesOf(s)
    return { cases: described(present), controls: described(absent) }
  },
  auc: (s) => delongArea(curveOf(s)).area,
  auc_variance: (s) => delongArea(curveOf(s)).variance,
  auc_se: (s) => delongArea(curveOf(s)).standardError,
  auc_ci95_untruncated: (s) => delongArea(curveOf(s)).plainUncut,
  auc_ci95_truncated: (s) => delongArea(curveOf(s)).plain,
  auc_ci95_logit: (s) => delongArea(curveOf(s)).logit,
  auc_test_vs_half: (s) => {
    const { z, p } = testAgainstHalf(delongArea(curveOf(s)))
    return { z, p }
  },
  auc_se_hanley_mcneil: (s) => hanleyMcNeilError(delongArea(curveOf(s))),
  mann_whitney: (s) => {
    const test = mannWhitney(curveOf(s))
    return {
      u_cases_raw: test.uPresent,
      u_controls_raw: test.uAbsent,
      u_in_disease_direction: test.uInDirection,
      p_two_sided_continuity_corrected: test.pContinuityCorrected,
      p_two_sided_uncorrected: test.p,
    }
  },
  roc_coordinates: (s) => {
    const { thresholds, midpoints, truePositives, falsePositives, nPresent, nAbsent } = curveOf(s)
    return {
      threshold: [...thresholds],
      midpoint: [...midpoints],
      tp: [...truePositives],
      fp: [...falsePositives],
      sensitivity: Array.from(truePositives, (tp) => tp / nPresent),
      specificity: Array.from(falsePositives, (fp) => (nAbsent - fp) / nAbsent),
    }
  },
  'partial_auc_spec_*': (s) => {
    const [from, to] = s.record.quantity.replace('partial_auc_spec_', '').split('_').map(Number)
    const { raw, corrected } = partialArea(curveOf(s), { from: from!, to: to! })
    return { raw, mcclish: corrected }
  },
  auc_binormal_smoothed: (s) => {
    const { area, intercept, slope } = binormalCurve(curveOf(s))
    return { auc: area, intercept, slope }
  },
  auc_binormal_moments: (s) => {
    const areas = orNull(() => binormalArea(classesOf(s)))
    return { raw: areas?.raw ?? null, log: areas?.log ?? null }
  },
  auc_ci95_bootstrap: (s) => {
    const { lower, upper, standardError } = bootstrapArea(curveOf(s), { seed: SEED })
    return {
      reference_50000_reps: { lower, upper },
      bootstrap_se_50000: standardError,
      proc_2000_reps: NOT_COMPARED,
      monte_carlo_sd_of_a_2000_rep_bound: NOT_COMPARED,
    }
  },
  paired_auc_difference: pairedDifference,
  paired_venkatraman: (s) => {
    const { table, markers } = pairedInput(s)
    const { p } = venkatramanTest(
      {
        first: table.numbers(markers[0]) as number[],
        second: table.numbers(markers[1]) as number[],
        present: table.outcomes() as boolean[],
      },
      // more than the library drew, so that the difference is its Monte Carlo error and hardly ours
      { seed: SEED, replicates: 10_000 },
    )
    return { p, statistic: NOT_COMPARED }
  },
  unpaired_auc_difference: unpairedDifference,
}

function described(values: Float64Array): Actual {
  const { n, mean, sd, smallest, lowerQuartile, median, upperQuartile, largest } =
    summariseValues(values)
  return { n, mean, sd, min: smallest, q1: lowerQuartile, median, q3: upperQuartile, max: largest }
}

function pairedInput({ record, table }: Surroundings) {
  const [first, second] = record.marker.split(' vs ') as [string, string]
  const markers: [string, string] = [first, second]
  return { markers, table: completeRows(table(record.dataset), markers) }
}

function pairedDifference(s: Surroundings): Actual {
  const { table, markers } = pairedInput(s)
  const directions = directionsOf(s.record.direction)
  const paired = pairedDelong(
    classesIn(table, markers[0], directions[0]),
    classesIn(table, markers[1], directions[1]),
  )
  return {
    n: paired.nPresent + paired.nAbsent,
    cases: paired.nPresent,
    auc1: paired.area1,
    auc2: paired.area2,
    difference: paired.difference,
    variance1: paired.variance1,
    variance2: paired.variance2,
    covariance: paired.covariance,
    se_difference: paired.standardError,
    z: paired.z,
    p: paired.p,
    ci95: paired.interval,
  }
}

/** The grouping column stands in brackets in the method's text. */
function unpairedDifference({ record, table, given }: Surroundings): Actual {
  const whole = table(record.dataset)
  const column = [...record.method.matchAll(/\((\w+)\)/g)]
    .map((match) => match[1]!)
    .find((name) => whole.has(name))
  if (column === undefined) throw new Error('The method names no column of groups.')
  const [direction] = directionsOf(record.direction)
  const groups = [given.group1, given.group2].map((name) =>
    classesIn(
      whole.where((row) => row[column] === String(name)),
      record.marker,
      direction,
    ),
  )
  const [first, second] = groups as [(typeof groups)[0], (typeof groups)[0]]
  const answer = independentAreas(rocCurve(first), rocCurve(second))
  return {
    group1: given.group1 as string,
    group2: given.group2 as string,
    n1: first.present.length + first.absent.length,
    n2: second.present.length + second.absent.length,
    cases1: first.present.length,
    cases2: second.present.length,
    auc1: answer.area1,
    auc2: answer.area2,
    difference: answer.difference,
    se_difference: answer.standardError,
    d_statistic: answer.statistic,
    df: answer.degreesOfFreedom,
    p_t: answer.pT,
    p_normal: answer.pNormal,
    ci95_normal: answer.interval,
  }
}
