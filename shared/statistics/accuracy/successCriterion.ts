import { StatisticsError } from '../StatisticsError.ts'

/** One measure that the plan sets a floor for, with the lower end of its interval. */
export type FlooredMeasure = {
  measure: 'sensitivity' | 'specificity' | 'area'
  /** What the plan demands, 0…1. */
  floor: number
  estimate: number | null
  /** Lower end of the two-sided interval that the plan names. */
  lower: number | null
}

export type SuccessCriterion = {
  met: boolean
  parts: (FlooredMeasure & { met: boolean; sentence: string })[]
}

/**
 * Whether a planned success criterion is met: the lower end of the interval lies above the floor, for
 * every measure that the plan makes (co-)primary. A measure without an interval is not met.
 * @throws StatisticsError 'out-of-range', 'too-few' (no measure)
 * Source: the co-primary ("all or none") rule, Offen et al 2007, Drug Inf J 41:19.
 */
export function successCriterion(measures: FlooredMeasure[]): SuccessCriterion {
  if (measures.length === 0) {
    throw new StatisticsError('too-few', 'A success criterion names at least one measure.')
  }
  const parts = measures.map((part) => {
    if (!(part.floor >= 0 && part.floor < 1)) {
      throw new StatisticsError('out-of-range', 'A floor lies at or above 0 and below 1.')
    }
    const met = part.lower !== null && part.lower > part.floor
    return { ...part, met, sentence: sentenceFor(part, met) }
  })
  return { met: parts.every((part) => part.met), parts }
}

function sentenceFor({ measure, floor, lower }: FlooredMeasure, met: boolean): string {
  if (lower === null) return `The ${measure} has no interval, so its floor of ${floor} is not met.`
  const place = met ? 'lies above' : 'does not lie above'
  return `The lower end of the interval of the ${measure}, ${lower.toFixed(3)}, ${place} the floor of ${floor}.`
}
