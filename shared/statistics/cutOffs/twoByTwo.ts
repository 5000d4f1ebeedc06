import type { Classes, Direction } from '../accuracy/Classes.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** Counts at one cut-off, index test against reference outcome. */
export type TwoByTwo = {
  truePositives: number
  falsePositives: number
  falseNegatives: number
  trueNegatives: number
}

/**
 * The two-by-two table at a cut-off: positive at or above it ('higher') or at or below it ('lower').
 * @param classes values by reference outcome; either class may be empty
 * @throws StatisticsError 'non-finite', 'too-few' (no values at all)
 */
export function twoByTwo({ present, absent, direction }: Classes, cutOff: number): TwoByTwo {
  if (!Number.isFinite(cutOff)) {
    throw new StatisticsError('non-finite', 'The cut-off is not a finite number.')
  }
  if (present.length + absent.length === 0) {
    throw new StatisticsError('too-few', 'There are no values to classify.')
  }
  requireFinite(present, 'Values with the condition present')
  requireFinite(absent, 'Values with the condition absent')
  const truePositives = countPositive(present, cutOff, direction)
  const falsePositives = countPositive(absent, cutOff, direction)
  return {
    truePositives,
    falsePositives,
    falseNegatives: present.length - truePositives,
    trueNegatives: absent.length - falsePositives,
  }
}

function countPositive(values: ArrayLike<number>, cutOff: number, direction: Direction): number {
  let count = 0
  for (let i = 0; i < values.length; i++) {
    if (direction === 'higher' ? values[i]! >= cutOff : values[i]! <= cutOff) count++
  }
  return count
}
