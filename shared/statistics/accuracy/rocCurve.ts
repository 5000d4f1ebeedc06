import { sortedValues } from '../description/sortedValues.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Classes, Direction } from './Classes.ts'

/**
 * All points of an empirical ROC curve, from the strictest cut-off (nobody positive) to the laxest
 * (everybody positive); entry k of each array belongs to point k.
 */
export type RocCurve = {
  direction: Direction
  nPresent: number
  nAbsent: number
  /** Observed values: positive at or above ('higher') or at or below ('lower'). Entry 0 is +Infinity
   * or −Infinity: the cut-off that no value reaches. */
  thresholds: Float64Array
  /** Midpoints between neighbouring observed values; infinite at both ends. Same points. */
  midpoints: Float64Array
  truePositives: Int32Array
  falsePositives: Int32Array
}

/**
 * The ROC curve of a marker. Ties make one point. Cost: two sorts and one pass.
 * @param classes at least one value in each class, values finite
 * @throws StatisticsError 'one-class', 'non-finite'
 * Source: Zweig & Campbell 1993, Clin Chem 39:561.
 */
export function rocCurve({ present, absent, direction }: Classes): RocCurve {
  if (present.length === 0 || absent.length === 0) {
    const which = present.length === 0 ? 'present' : 'absent'
    throw new StatisticsError(
      'one-class',
      `Nobody has the reference outcome "${which}", so nothing can be told apart.`,
    )
  }
  const positives = sortedValues(present, 'Values with the condition present')
  const negatives = sortedValues(absent, 'Values with the condition absent')
  return direction === 'higher'
    ? sweepDownwards(positives, negatives)
    : sweepUpwards(positives, negatives)
}

function emptyCurve(nPresent: number, nAbsent: number, direction: Direction): RocCurve {
  const size = nPresent + nAbsent + 1
  const beyond = direction === 'higher' ? Infinity : -Infinity
  return {
    direction,
    nPresent,
    nAbsent,
    thresholds: new Float64Array(size).fill(beyond, 0, 1),
    midpoints: new Float64Array(size).fill(beyond, 0, 1),
    truePositives: new Int32Array(size),
    falsePositives: new Int32Array(size),
  }
}

function sweepDownwards(positives: Float64Array, negatives: Float64Array): RocCurve {
  const curve = emptyCurve(positives.length, negatives.length, 'higher')
  let i = positives.length - 1
  let j = negatives.length - 1
  let point = 0
  while (i >= 0 || j >= 0) {
    const value =
      j < 0 || (i >= 0 && positives[i]! >= negatives[j]!) ? positives[i]! : negatives[j]!
    while (i >= 0 && positives[i] === value) i--
    while (j >= 0 && negatives[j] === value) j--
    point++
    curve.thresholds[point] = value
    curve.truePositives[point] = positives.length - 1 - i
    curve.falsePositives[point] = negatives.length - 1 - j
  }
  return finished(curve, point)
}

function sweepUpwards(positives: Float64Array, negatives: Float64Array): RocCurve {
  const curve = emptyCurve(positives.length, negatives.length, 'lower')
  let i = 0
  let j = 0
  let point = 0
  while (i < positives.length || j < negatives.length) {
    const fromPositives =
      j >= negatives.length || (i < positives.length && positives[i]! <= negatives[j]!)
    const value = fromPositives ? positives[i]! : negatives[j]!
    while (i < positives.length && positives[i] === value) i++
    while (j < negatives.length && negatives[j] === value) j++
    point++
    curve.thresholds[point] = value
    curve.truePositives[point] = i
    curve.falsePositives[point] = j
  }
  return finished(curve, point)
}

function finished(curve: RocCurve, last: number): RocCurve {
  const { thresholds, midpoints } = curve
  for (let k = 1; k < last; k++) midpoints[k] = thresholds[k]! / 2 + thresholds[k + 1]! / 2
  midpoints[last] = -thresholds[0]!
  return {
    ...curve,
    thresholds: thresholds.subarray(0, last + 1),
    midpoints: midpoints.subarray(0, last + 1),
    truePositives: curve.truePositives.subarray(0, last + 1),
    falsePositives: curve.falsePositives.subarray(0, last + 1),
  }
}
