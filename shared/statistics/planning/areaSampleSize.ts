import { hanleyMcNeilError } from '../accuracy/hanleyMcNeilError.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import { areaPower } from './areaPower.ts'
import { type AreaTestPlan, areaTestPlan } from './areaTestPlan.ts'
import { obuchowskiVariance } from './obuchowskiVariance.ts'
import { smallestWhole } from './smallestWhole.ts'

export type AreaSampleSize = {
  /** Hanley & McNeil 1982 with the full formula: the one to plan by. */
  finite: { present: number; absent: number; power: number }
  /** The same without its terms in 1/n. */
  asymptotic: { presentExact: number; present: number; absent: number }
  /** Obuchowski 2004, binormal variance under both hypotheses. */
  binormal: { presentExact: number; present: number; absent: number }
}

/**
 * Subjects needed to show that an area differs from a null value (two-sided test): the smallest number
 * present with z(1 − α/2)·SE0 + z(power)·SE1 ≤ |A1 − A0|, absent rounded up.
 * @throws StatisticsError 'out-of-range'
 * Source: Hanley & McNeil 1982, Radiology 143:29; Obuchowski 2004, Acad Radiol 11:1178.
 */
export function areaSampleSize(plan: AreaTestPlan): AreaSampleSize {
  const full = areaTestPlan(plan)
  const { alternative, alpha, power, absentPerPresent: k } = full
  const zAlpha = -normalQuantile(alpha / 2)
  const zBeta = normalQuantile(power)
  const gap = Math.abs(alternative - full.null)
  const absentFor = (present: number) => Math.ceil(k * present - 1e-9)
  const error = (area: number, present: number) =>
    hanleyMcNeilError({ area, nPresent: present, nAbsent: absentFor(present) })
  const present = smallestWhole(
    (n) => zAlpha * error(full.null, n) + zBeta * error(alternative, n) <= gap,
    1,
  )
  const needed = (variance: (area: number) => number) => {
    const sum = zAlpha * Math.sqrt(variance(full.null)) + zBeta * Math.sqrt(variance(alternative))
    const presentExact = (sum / gap) ** 2
    const whole = Math.ceil(presentExact)
    return { presentExact, present: whole, absent: absentFor(whole) }
  }
  const nAbsent = absentFor(present)
  return {
    finite: {
      present,
      absent: nAbsent,
      power: areaPower({
        alternative,
        null: full.null,
        alpha,
        nPresent: present,
        nAbsent,
      }),
    },
    asymptotic: needed((area) => limitVariance(area, k)),
    binormal: needed((area) => obuchowskiVariance(area, k)),
  }
}

/** n(present) times the Hanley–McNeil variance as n grows. */
function limitVariance(area: number, k: number): number {
  const square = area * area
  return (area / (2 - area) - square) / k + ((2 * square) / (1 + area) - square)
}
