import { normalTwoSided } from '../distributions/normalTwoSided.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Classes } from './Classes.ts'
import { placements } from './placements.ts'

export type PairedDelong = {
  nPresent: number
  nAbsent: number
  area1: number
  area2: number
  /** area1 − area2 */
  difference: number
  variance1: number
  variance2: number
  covariance: number
  standardError: number
  /** Two identical curves give z = 0 and p = 1; null where the variance is 0 but the areas differ. */
  z: number | null
  p: number | null
  interval: Interval | null
  notDefined: NotDefined | null
}

/**
 * Compares the areas of two markers measured on the same subjects.
 * @param first, second values of the two markers, the same subjects in the same order, ≥ 2 a class
 * @throws StatisticsError 'unequal-length', 'too-few', 'one-class', 'non-finite'
 * Source: DeLong, DeLong & Clarke-Pearson 1988, Biometrics 44:837.
 */
export function pairedDelong(
  first: Classes,
  second: Classes,
  { level = 0.95 }: LevelOption = {},
): PairedDelong {
  const m = first.present.length
  const n = first.absent.length
  if (second.present.length !== m || second.absent.length !== n) {
    throw new StatisticsError(
      'unequal-length',
      'Both markers must be there for the same subjects; leave out who lacks one.',
    )
  }
  if (m < 2 || n < 2) {
    throw new StatisticsError(
      'too-few',
      'Comparing areas needs at least two subjects in each class.',
    )
  }
  const one = placements(first)
  const two = placements(second)
  const moment = (which: 1 | 2 | 12) => productMoment(one, two, which)
  const variance1 = moment(1)
  const variance2 = moment(2)
  const covariance = moment(12)
  const difference = one.area - two.area
  // below rounding of the three terms the curves do not differ in any placement
  const raw = variance1 + variance2 - 2 * covariance
  const variance = raw > 1e-15 * (variance1 + variance2) ? raw : 0
  const standardError = Math.sqrt(variance)
  const areas = { nPresent: m, nAbsent: n, area1: one.area, area2: two.area, difference }
  const spread = { variance1, variance2, covariance, standardError }
  if (standardError === 0) return { ...areas, ...spread, ...withoutSpread(difference) }
  const z = difference / standardError
  const half = zFor(level) * standardError
  const interval = { lower: difference - half, upper: difference + half }
  return { ...areas, ...spread, z, p: normalTwoSided(z), interval, notDefined: null }
}

type PlacementPair = { area: number; ofPresent: Float64Array; ofAbsent: Float64Array }

function productMoment(one: PlacementPair, two: PlacementPair, which: 1 | 2 | 12): number {
  const a = which === 2 ? two : one
  const b = which === 1 ? one : two
  return (
    covarianceOf(a.ofPresent, a.area, b.ofPresent, b.area) / a.ofPresent.length +
    covarianceOf(a.ofAbsent, a.area, b.ofAbsent, b.area) / a.ofAbsent.length
  )
}

function covarianceOf(x: Float64Array, meanX: number, y: Float64Array, meanY: number): number {
  let sum = 0
  for (let i = 0; i < x.length; i++) sum += (x[i]! - meanX) * (y[i]! - meanY)
  return sum / (x.length - 1)
}

function withoutSpread(difference: number) {
  if (difference === 0) {
    return { z: 0, p: 1, interval: { lower: 0, upper: 0 }, notDefined: null }
  }
  const notDefined: NotDefined = {
    code: 'zero-variance',
    sentence: 'The difference has no estimable variance, so it cannot be tested.',
  }
  return { z: null, p: null, interval: null, notDefined }
}
