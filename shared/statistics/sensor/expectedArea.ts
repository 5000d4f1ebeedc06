import { normalCdf } from '../distributions/normalCdf.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** True distributions of the two classes and the sensor's error, all in one unit. */
export type NoisySensor = {
  meanPresent: number
  meanAbsent: number
  sdPresent: number
  sdAbsent: number
  /** SD of a single reading's error within a session. */
  sdReading: number
  /** SD from day to day, which replicates of one session do not average away; 0 unless given. */
  sdDay?: number
  /** Exhalations averaged. */
  replicates: number
}

export type ExpectedArea = {
  /** Area without any error, and as it will be seen. */
  trueArea: number
  observedArea: number
  /** Sensitivity at the given specificity, without error and as seen. */
  trueSensitivity: number
  observedSensitivity: number
  specificity: number
}

/**
 * How a sensor's noise and the number of replicates move the expected area and sensitivity, for normal
 * values: Φ(Δ/√(σ1² + σ0² + 2σe²)), σe² = σ_day² + σ_reading²/m. Larger values point to the condition.
 * @param options `specificity` at which the sensitivity is wanted, 0.9 unless given
 * @throws StatisticsError 'out-of-range'
 * Source: Coffin & Sukhatme 1997, Biometrics 53:823; Reiser 2000, Stat Med 19:2115; Tosteson et al 2005.
 */
export function expectedArea(
  sensor: NoisySensor,
  { specificity = 0.9 }: { specificity?: number } = {},
): ExpectedArea {
  requireCount(sensor.replicates, 'The number of replicates', 1)
  requireProbability(specificity, 'The specificity')
  const { sdPresent, sdAbsent, sdReading, sdDay = 0, replicates } = sensor
  const spreads = [sdPresent, sdAbsent, sdReading, sdDay]
  if (!spreads.every((sd) => sd >= 0) || sdPresent + sdAbsent === 0) {
    throw new StatisticsError('out-of-range', 'SDs cannot be negative, nor both classes constant.')
  }
  const gap = sensor.meanPresent - sensor.meanAbsent
  const error = sdDay * sdDay + (sdReading * sdReading) / replicates
  const area = (noise: number) =>
    normalCdf(gap / Math.sqrt(sdPresent ** 2 + sdAbsent ** 2 + 2 * noise))
  const sensitivity = (noise: number) => {
    const cutOff = normalQuantile(specificity) * Math.sqrt(sdAbsent ** 2 + noise)
    const spread = Math.sqrt(sdPresent ** 2 + noise)
    // a class without any spread lies wholly on one side
    if (spread === 0) return gap >= cutOff ? 1 : 0
    return normalCdf((gap - cutOff) / spread)
  }
  return {
    trueArea: area(0),
    observedArea: area(error),
    trueSensitivity: sensitivity(0),
    observedSensitivity: sensitivity(error),
    specificity,
  }
}
