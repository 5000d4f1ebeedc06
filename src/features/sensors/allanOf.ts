import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { type AllanPoint, allanDeviation } from '#shared/statistics/sensor/allanDeviation.ts'
import type { Refusal } from './csvTable.ts'
import type { Series } from './seriesReader.ts'

/** Plain data, so that a worker can send it. Times are in readings: the page knows the interval. */
export type AllanOutcome =
  | { n: number; overlapping: AllanPoint[]; apart: AllanPoint[]; problem: null }
  | { problem: string; refused: Refusal[]; refusedCount: number }

/**
 * Both Allan deviations of a series, an interval of one second taken for granted. A series with a gap
 * is refused: its readings are no longer evenly spaced.
 */
export function allanOf({ readings, refused, refusedCount }: Series): AllanOutcome {
  if (refusedCount > 0)
    return {
      problem:
        'A series with gaps is not evenly spaced, so nothing was computed. Mend these lines, or cut the file to a stretch without them.',
      refused,
      refusedCount,
    }
  try {
    return {
      n: readings.length,
      overlapping: allanDeviation(readings),
      apart: allanDeviation(readings, { overlapping: false }),
      problem: null,
    }
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    return { problem: `${error.message} Give a longer series.`, refused: [], refusedCount: 0 }
  }
}

/** The same points at the times that an interval between readings gives. */
export const atInterval = (points: readonly AllanPoint[], intervalS: number): AllanPoint[] =>
  points.map((point) => ({ ...point, tauS: point.m * intervalS }))
