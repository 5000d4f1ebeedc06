import { StatisticsError } from '#shared/statistics/StatisticsError.ts'

export type CompletePairs = { first: Float64Array; second: Float64Array; dropped: number }

/**
 * Keeps the pairs that have both values, in their order, and counts the others.
 * @throws StatisticsError 'unequal-length'
 */
export function completePairs(
  first: ArrayLike<number | null>,
  second: ArrayLike<number | null>,
): CompletePairs {
  if (first.length !== second.length) {
    throw new StatisticsError('unequal-length', 'Each value needs its partner.')
  }
  const kept: [number, number][] = []
  for (let i = 0; i < first.length; i++) {
    const a = first[i]
    const b = second[i]
    if (a !== null && a !== undefined && b !== null && b !== undefined) kept.push([a, b])
  }
  return {
    first: Float64Array.from(kept, (pair) => pair[0]),
    second: Float64Array.from(kept, (pair) => pair[1]),
    dropped: first.length - kept.length,
  }
}
