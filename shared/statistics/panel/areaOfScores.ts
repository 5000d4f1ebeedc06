import { placementSums } from '../accuracy/placementSums.ts'
import { rocCurve } from '../accuracy/rocCurve.ts'

/** Area under the curve of scores where larger ones point to the condition, by outcome in one order. */
export function areaOfScores(
  scores: ArrayLike<number>,
  outcomes: ArrayLike<boolean | number>,
): number {
  const present: number[] = []
  const absent: number[] = []
  for (let i = 0; i < scores.length; i++) (outcomes[i] ? present : absent).push(scores[i]!)
  return placementSums(rocCurve({ present, absent, direction: 'higher' })).area
}
