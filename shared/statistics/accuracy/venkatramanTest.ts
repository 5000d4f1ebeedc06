import { sortedOrder } from '../description/sortedOrder.ts'
import type { Resampling } from '../random/Resampling.ts'
import { randomStream } from '../random/randomStream.ts'
import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** Two markers of the same subjects, in one order; `present` 1 or true where the condition is there. */
export type PairedMarkers = {
  first: ArrayLike<number>
  second: ArrayLike<number>
  present: ArrayLike<boolean | number>
}

export type VenkatramanTest = { statistic: number; p: number; permutations: number; seed: number }

/**
 * Permutation test that two correlated ROC curves are the same at every operating point, not only in
 * area. Both markers must point the same way. Ties of the data are ranked in the order of the subjects;
 * in the permutations they are broken at random.
 * @throws StatisticsError 'unequal-length', 'one-class', 'non-finite', 'out-of-range'
 * Source: Venkatraman & Begg 1996, Biometrika 83:835.
 */
export function venkatramanTest(
  { first, second, present }: PairedMarkers,
  { seed, replicates = 2000, onProgress }: Resampling,
): VenkatramanTest {
  const n = present.length
  if (first.length !== n || second.length !== n) {
    throw new StatisticsError('unequal-length', 'Both markers are needed for the same subjects.')
  }
  requireCount(replicates, 'The number of permutations', 1)
  const isPresent = Uint8Array.from({ length: n }, (_, i) => (present[i] ? 1 : 0))
  const cases = isPresent.reduce((sum, one) => sum + one, 0)
  if (cases === 0 || cases === n)
    throw new StatisticsError('one-class', 'Both outcomes are needed.')
  const ranks1 = ranksInOrder(Float64Array.from(first))
  const ranks2 = ranksInOrder(Float64Array.from(second))
  const statistic = distance(ranks1, ranks2, isPresent)
  const random = randomStream(seed)
  const mixed1 = new Float64Array(n)
  const mixed2 = new Float64Array(n)
  let asFar = 0
  for (let r = 0; r < replicates; r++) {
    for (let i = 0; i < n; i++) {
      const swap = random() < 0.5
      // exchanging ranks between the markers makes ties: break them at random
      mixed1[i] = (swap ? ranks2[i]! : ranks1[i]!) + random() - 0.5
      mixed2[i] = (swap ? ranks1[i]! : ranks2[i]!) + random() - 0.5
    }
    if (distance(ranksInOrder(mixed1), ranksInOrder(mixed2), isPresent) >= statistic) asFar++
    if (r % 100 === 99) onProgress?.((r + 1) / replicates)
  }
  return { statistic, p: asFar / replicates, permutations: replicates, seed }
}

/** Ranks 1…n; equal values keep their order. */
function ranksInOrder(values: Float64Array): Uint32Array {
  const ranks = new Uint32Array(values.length)
  sortedOrder(values, 'The values').forEach((index, k) => {
    ranks[index] = k + 1
  })
  return ranks
}

/** Sum over all cut-offs of the difference in the number of errors (false negatives and positives). */
function distance(ranks1: Uint32Array, ranks2: Uint32Array, isPresent: Uint8Array): number {
  const n = isPresent.length
  const change = new Int32Array(n + 1)
  for (let i = 0; i < n; i++) {
    // raising the cut-off past a present subject adds an error, past an absent one takes one away
    const step = isPresent[i] === 1 ? 1 : -1
    change[ranks1[i]!]! += step
    change[ranks2[i]!]! -= step
  }
  let gap = 0
  let sum = 0
  for (let k = 1; k <= n; k++) {
    gap += change[k]!
    sum += Math.abs(gap)
  }
  return sum
}
