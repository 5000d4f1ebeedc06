import { hanleyMcNeilError } from '../accuracy/hanleyMcNeilError.ts'
import { normalCdf } from '../distributions/normalCdf.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import { areaTestPlan } from './areaTestPlan.ts'

/**
 * Power of a two-sided test of an area against a null value with given numbers of subjects.
 * @throws StatisticsError 'out-of-range'
 * Source: Hanley & McNeil 1982, Radiology 143:29, both standard errors in full.
 */
export function areaPower(design: {
  alternative: number
  null: number
  alpha?: number
  nPresent: number
  nAbsent: number
}): number {
  const { alternative, alpha, null: nullArea } = areaTestPlan({ ...design, power: 0.5 })
  const { nPresent, nAbsent } = design
  const error = (area: number) => hanleyMcNeilError({ area, nPresent, nAbsent })
  const gap = Math.abs(alternative - nullArea)
  return normalCdf((gap + normalQuantile(alpha / 2) * error(nullArea)) / error(alternative))
}
