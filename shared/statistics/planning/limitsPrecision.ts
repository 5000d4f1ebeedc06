import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import { requireCount } from '../requireCount.ts'

export type LimitsPrecision = {
  n: number
  /** Half-width of the interval of a limit of agreement in SD: z·√(3/n), and by the 1999 formula. */
  halfWidthSd: number
  halfWidthSd1999: number
}

/**
 * How precisely n pairs place a limit of agreement, as a multiple of the SD of the differences.
 * @param n at least 3 pairs
 * @throws StatisticsError 'out-of-range'
 * Source: Bland & Altman 1986, Lancet i:307; 1999, Stat Methods Med Res 8:135.
 */
export function limitsPrecision(n: number, { level = 0.95 }: LevelOption = {}): LimitsPrecision {
  requireCount(n, 'The number of pairs', 3)
  const z = zFor(level)
  const limit = zFor(0.95)
  return {
    n,
    halfWidthSd: z * Math.sqrt(3 / n),
    halfWidthSd1999: z * Math.sqrt(1 / n + (limit * limit) / (2 * (n - 1))),
  }
}
