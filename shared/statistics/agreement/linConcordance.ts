import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

export type LinConcordance = {
  n: number
  estimate: number
  /** On Fisher's z scale (to show) and asymptotic. Null where the points lie on one line. */
  interval: Interval | null
  asymptoticInterval: Interval | null
  /** How far the best line lies from identity, 1 = on it. */
  biasCorrection: number
  /** SD second / SD first. */
  scaleShift: number
  /** (mean second − mean first)/√(SD first · SD second). */
  locationShift: number
}

/**
 * Lin's concordance correlation coefficient; moments divide by n, the variance by n − 2.
 * @param pairs n ≥ 3 pairs in one unit
 * @throws StatisticsError as limitsOfAgreement, and 'constant'
 * Source: Lin 1989, Biometrics 45:255, with the correction of 2000, Biometrics 56:324.
 */
export function linConcordance(pairs: Pairs, { level = 0.95 }: LevelOption = {}): LinConcordance {
  requirePairs(pairs, 3)
  const { n, meanX, meanY, varianceX, varianceY, covariance } = populationMoments(pairs)
  if (varianceX === 0 || varianceY === 0) {
    throw new StatisticsError('constant', 'One of the two measures never varies.')
  }
  const shift = meanY - meanX
  const sdX = Math.sqrt(varianceX)
  const sdY = Math.sqrt(varianceY)
  const estimate = (2 * covariance) / (varianceX + varianceY + shift * shift)
  const r = covariance / (sdX * sdY)
  const scaleShift = sdY / sdX
  const locationShift = shift / Math.sqrt(sdX * sdY)
  const biasCorrection = 2 / (scaleShift + 1 / scaleShift + locationShift * locationShift)
  const intervals = concordanceIntervals({ n, estimate, r, locationShift, z: zFor(level) })
  return { n, estimate, ...intervals, biasCorrection, scaleShift, locationShift }
}

function populationMoments({ first, second }: Pairs) {
  const n = first.length
  let meanX = 0
  let meanY = 0
  for (let i = 0; i < n; i++) {
    meanX += first[i]! / n
    meanY += second[i]! / n
  }
  let varianceX = 0
  let varianceY = 0
  let covariance = 0
  for (let i = 0; i < n; i++) {
    const x = first[i]! - meanX
    const y = second[i]! - meanY
    varianceX += (x * x) / n
    varianceY += (y * y) / n
    covariance += (x * y) / n
  }
  return { n, meanX, meanY, varianceX, varianceY, covariance }
}

function concordanceIntervals(parts: {
  n: number
  estimate: number
  r: number
  locationShift: number
  z: number
}): Pick<LinConcordance, 'interval' | 'asymptoticInterval'> {
  const { n, estimate: p, r, locationShift: u, z } = parts
  if (r === 0 || Math.abs(p) >= 1) return { interval: null, asymptoticInterval: null }
  const u2 = u * u
  const variance =
    (((1 - r * r) * p * p * (1 - p * p)) / (r * r) +
      (2 * p ** 3 * (1 - p) * u2) / r -
      (0.5 * p ** 4 * u2 * u2) / (r * r)) /
    (n - 2)
  if (!(variance > 0)) return { interval: null, asymptoticInterval: null }
  const se = Math.sqrt(variance)
  const fisher = Math.atanh(p)
  const fisherSe = se / (1 - p * p)
  return {
    interval: { lower: Math.tanh(fisher - z * fisherSe), upper: Math.tanh(fisher + z * fisherSe) },
    asymptoticInterval: { lower: p - z * se, upper: p + z * se },
  }
}
