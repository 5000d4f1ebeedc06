import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { newcombeAreaInterval } from './newcombeAreaInterval.ts'
import { placementSums } from './placementSums.ts'
import type { RocCurve } from './rocCurve.ts'

export type AreaMethod = 'DeLong' | 'DeLong, logit scale' | 'Newcombe, method 5'

export type DelongArea = {
  nPresent: number
  nAbsent: number
  area: number
  /** Null with fewer than two values in a class. */
  variance: number | null
  standardError: number | null
  /** area ∓ z·SE cut to 0…1; as it comes in `plainUncut`. */
  plain: Interval | null
  plainUncut: Interval | null
  /** On the logit scale; null at an area of 0 or 1. */
  logit: Interval | null
  /** Set where DeLong's variance cannot be estimated or is 0; `shown` then is Newcombe's. */
  notEstimable: NotDefined | null
  /** The interval to show, with its method's name. */
  shown: Interval & { method: AreaMethod }
}

/**
 * Area under the ROC curve (trapezoids = Mann–Whitney, ties one half) with DeLong's variance and
 * intervals.
 * @param curve from rocCurve
 * @param options `level`; `scale` 'plain' (unless given) or 'logit' chooses the interval shown
 * @throws StatisticsError 'out-of-range' (level)
 * Source: DeLong, DeLong & Clarke-Pearson 1988, Biometrics 44:837; midranks as in Sun & Xu 2014.
 */
export function delongArea(
  curve: RocCurve,
  { level = 0.95, scale = 'plain' }: LevelOption & { scale?: 'plain' | 'logit' } = {},
): DelongArea {
  const { nPresent, nAbsent } = curve
  const { area, variancePresent, varianceAbsent } = placementSums(curve)
  const variance =
    variancePresent === null || varianceAbsent === null
      ? null
      : variancePresent / nPresent + varianceAbsent / nAbsent
  const standardError = variance === null ? null : Math.sqrt(variance)
  const z = zFor(level)
  const plainUncut =
    standardError === null
      ? null
      : { lower: area - z * standardError, upper: area + z * standardError }
  const plain = plainUncut && {
    lower: Math.max(0, plainUncut.lower),
    upper: Math.min(1, plainUncut.upper),
  }
  const logit = standardError === null ? null : logitInterval(area, z * standardError)
  const notEstimable = reason(area, variance)
  const fallback = () => ({
    ...newcombeAreaInterval({ area, nPresent, nAbsent }, { level }),
    method: 'Newcombe, method 5' as const,
  })
  const shown = (): DelongArea['shown'] => {
    if (notEstimable !== null || plain === null) return fallback()
    if (scale === 'plain') return { ...plain, method: 'DeLong' }
    return logit === null ? fallback() : { ...logit, method: 'DeLong, logit scale' }
  }
  return {
    nPresent,
    nAbsent,
    area,
    variance,
    standardError,
    plain,
    plainUncut,
    logit,
    notEstimable,
    shown: shown(),
  }
}

function logitInterval(area: number, halfWidth: number): Interval | null {
  if (area === 0 || area === 1) return null
  const centre = Math.log(area / (1 - area))
  const half = halfWidth / (area * (1 - area))
  return {
    lower: 1 / (1 + Math.exp(half - centre)),
    upper: 1 / (1 + Math.exp(-half - centre)),
  }
}

function reason(area: number, variance: number | null): NotDefined | null {
  if (variance === null) {
    return {
      code: 'too-few',
      sentence: 'DeLong’s variance needs at least two values in each class.',
    }
  }
  if (variance > 0) return null
  const why =
    area === 0 || area === 1
      ? 'The classes do not overlap at all'
      : 'Every value of a class stands alike to the other class'
  return {
    code: 'zero-variance',
    sentence: `${why}, so DeLong’s variance is 0 and says nothing about precision. The interval shown is Newcombe’s.`,
  }
}
