import type { Classes, Direction } from '#shared/statistics/accuracy/Classes.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'

export type ClassesByOutcome = Classes & {
  present: Float64Array
  absent: Float64Array
  /** Rows left out because the value was missing. */
  missingValues: number
  /** Rows left out because the outcome was missing or indeterminate. */
  missingOutcomes: number
}

/**
 * Splits a column of values by reference outcome, leaving out and counting what is missing.
 * @param values finite or null  @param outcomes true = present, false = absent, null = not known
 * @throws StatisticsError 'unequal-length'
 */
export function classesByOutcome(
  values: ArrayLike<number | null>,
  outcomes: ArrayLike<boolean | null>,
  direction: Direction,
): ClassesByOutcome {
  if (values.length !== outcomes.length) {
    throw new StatisticsError('unequal-length', 'Each value needs its reference outcome.')
  }
  const present: number[] = []
  const absent: number[] = []
  let missingValues = 0
  let missingOutcomes = 0
  for (let i = 0; i < values.length; i++) {
    const value = values[i]
    const outcome = outcomes[i]
    if (outcome === null || outcome === undefined) missingOutcomes++
    else if (value === null || value === undefined) missingValues++
    else (outcome ? present : absent).push(value)
  }
  return {
    present: Float64Array.from(present),
    absent: Float64Array.from(absent),
    direction,
    missingValues,
    missingOutcomes,
  }
}
