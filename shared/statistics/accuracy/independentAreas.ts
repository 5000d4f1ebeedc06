import { normalTwoSided } from '../distributions/normalTwoSided.ts'
import { studentTTwoSided } from '../distributions/studentTTwoSided.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { delongArea } from './delongArea.ts'
import type { RocCurve } from './rocCurve.ts'

export type IndependentAreas = {
  area1: number
  area2: number
  difference: number
  standardError: number | null
  statistic: number | null
  /** Welch–Satterthwaite, each variance with its group's size less one. */
  degreesOfFreedom: number | null
  /** Statistic referred to t, and to the normal distribution. */
  pT: number | null
  pNormal: number | null
  /** difference ∓ z·SE */
  interval: Interval | null
  notDefined: NotDefined | null
}

/**
 * Compares the areas of two groups of different subjects.
 * @param first, second curves of the two groups
 * Source: DeLong et al 1988; degrees of freedom Welch 1947, as in Robin et al 2011, BMC Bioinformatics 12:77.
 */
export function independentAreas(
  first: RocCurve,
  second: RocCurve,
  { level = 0.95 }: LevelOption = {},
): IndependentAreas {
  const one = delongArea(first, { level })
  const two = delongArea(second, { level })
  const difference = one.area - two.area
  const areas = { area1: one.area, area2: two.area, difference }
  const v1 = one.variance
  const v2 = two.variance
  if (v1 === null || v2 === null || v1 + v2 === 0) {
    const few = v1 === null || v2 === null
    const sentence = few
      ? 'Each group needs at least two subjects of each outcome.'
      : 'Neither area has an estimable variance, so they cannot be compared.'
    const notDefined: NotDefined = { code: few ? 'too-few' : 'zero-variance', sentence }
    const nothing = { standardError: few ? null : 0, statistic: null, degreesOfFreedom: null }
    return { ...areas, ...nothing, pT: null, pNormal: null, interval: null, notDefined }
  }
  const standardError = Math.sqrt(v1 + v2)
  const statistic = difference / standardError
  const n1 = one.nPresent + one.nAbsent
  const n2 = two.nPresent + two.nAbsent
  const degreesOfFreedom = (v1 + v2) ** 2 / (v1 ** 2 / (n1 - 1) + v2 ** 2 / (n2 - 1))
  const half = zFor(level) * standardError
  return {
    ...areas,
    standardError,
    statistic,
    degreesOfFreedom,
    pT: studentTTwoSided(statistic, degreesOfFreedom),
    pNormal: normalTwoSided(statistic),
    interval: { lower: difference - half, upper: difference + half },
    notDefined: null,
  }
}
