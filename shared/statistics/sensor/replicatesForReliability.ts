import { requireProbability } from '../requireProbability.ts'

/**
 * How many replicates raise a single reading's reliability to the one wanted (Spearman–Brown), as
 * computed and rounded up.
 * @param single, wanted strictly between 0 and 1
 * @throws StatisticsError 'out-of-range'
 * Source: Spearman 1910, Br J Psychol 3:271; Brown 1910, ibid. 3:296.
 */
export function replicatesForReliability(
  single: number,
  wanted: number,
): { exact: number; replicates: number } {
  requireProbability(single, 'The reliability of a single reading')
  requireProbability(wanted, 'The reliability wanted')
  const exact = (wanted * (1 - single)) / (single * (1 - wanted))
  return { exact, replicates: Math.max(1, Math.ceil(exact - 1e-9)) }
}
