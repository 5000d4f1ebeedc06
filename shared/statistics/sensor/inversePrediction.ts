import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import type { LeastSquares } from '../regression/leastSquares.ts'
import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type InversePrediction = {
  level: number
  standardError: number
  /** level ∓ t(n − 2)·SE */
  approximate: Interval
  /** Fieller's limits; null where the slope does not differ from 0, so that they are unbounded. */
  fieller: Interval | null
  notDefined: NotDefined | null
}

/**
 * The level that a mean signal of m readings points to on an unweighted calibration line.
 * @param line from calibrationLine without weights  @param readings m ≥ 1
 * @throws StatisticsError 'out-of-range', 'non-finite', 'constant'
 * Source: Miller & Miller 2010, section 5.6; Fieller 1954, J R Stat Soc B 16:175.
 */
export function inversePrediction(
  line: LeastSquares,
  { meanSignal, readings }: { meanSignal: number; readings: number },
  { level: confidence = 0.95 }: LevelOption = {},
): InversePrediction {
  requireCount(readings, 'The number of readings', 1)
  if (!Number.isFinite(meanSignal)) {
    throw new StatisticsError('non-finite', 'The mean signal is not a finite number.')
  }
  const { intercept, slope, residualSd: s, n, meanX, meanY, sumSquaresX: sxx } = line
  if (slope === 0) throw new StatisticsError('constant', 'The calibration line has no slope.')
  const t = studentTQuantile(1 - (1 - confidence) / 2, n - 2)
  const level = (meanSignal - intercept) / slope
  const rise = meanSignal - meanY
  const share = 1 / readings + 1 / n
  const standardError =
    (s / Math.abs(slope)) * Math.sqrt(share + (rise * rise) / (slope * slope * sxx))
  const approximate = { lower: level - t * standardError, upper: level + t * standardError }
  const noise = t * t * s * s
  // (b² − t²s²/Sxx)u² − 2·b·rise·u + rise² − t²s²(1/m + 1/n) = 0 for u = level − mean level
  const a = slope * slope - noise / sxx
  if (a <= 0) {
    const sentence = 'The slope does not differ from 0, so the level has no bounds.'
    const notDefined: NotDefined = { code: 'unbounded', sentence }
    return { level, standardError, approximate, fieller: null, notDefined }
  }
  const b = slope * rise
  const root = Math.sqrt(Math.max(0, b * b - a * (rise * rise - noise * share)))
  const fieller = { lower: meanX + (b - root) / a, upper: meanX + (b + root) / a }
  return { level, standardError, approximate, fieller, notDefined: null }
}
