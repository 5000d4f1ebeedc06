import { normalQuantile } from '../distributions/normalQuantile.ts'
import { areaTestPlan } from './areaTestPlan.ts'
import { obuchowskiVariance } from './obuchowskiVariance.ts'

export type SampleSize = {
  presentExact: number
  absentExact: number
  present: number
  absent: number
}

/**
 * Subjects needed to show that an area differs from 0.5, with the binormal variance; under the null it
 * is 0.0792·(1 + 1/k).
 * @throws StatisticsError 'out-of-range'
 * Source: Obuchowski 2004, Acad Radiol 11:1178.
 */
export function areaSampleSizeAgainstHalf(plan: {
  area: number
  power: number
  alpha?: number
  absentPerPresent?: number
}): SampleSize {
  const full = areaTestPlan({ ...plan, alternative: plan.area, null: 0.5 })
  const k = full.absentPerPresent
  const root =
    -normalQuantile(full.alpha / 2) * Math.sqrt(0.0792 * (1 + 1 / k)) +
    normalQuantile(full.power) * Math.sqrt(obuchowskiVariance(plan.area, k))
  const presentExact = (root / (plan.area - 0.5)) ** 2
  const absentExact = k * presentExact
  return {
    presentExact,
    absentExact,
    present: Math.ceil(presentExact),
    absent: Math.ceil(absentExact),
  }
}
