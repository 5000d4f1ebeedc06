import { chiSquaredUpperTail } from '../distributions/chiSquaredUpperTail.ts'
import { fairBinomial } from '../distributions/fairBinomial.ts'
import type { NotDefined } from '../NotDefined.ts'
import { requireCount } from '../requireCount.ts'

export type McnemarTest = {
  exactP: number
  /** 1 − P(X = x)/2 where the discordant counts are equal; so 0.5, and no test, where there are none. */
  midP: number
  /** Null without any discordant subject. */
  chiSquared: number | null
  p: number | null
  chiSquaredContinuity: number | null
  notDefined: NotDefined | null
}

/**
 * Whether two tests on the same subjects differ in how often they are positive; depends on the
 * discordant subjects alone. The mid-p is the one to show.
 * @throws StatisticsError 'out-of-range'
 * Source: McNemar 1947, Psychometrika 12:153; mid-p Fagerland, Lydersen & Laake 2013, BMC Med Res Methodol 13:91.
 */
export function mcnemarTest({
  firstOnly,
  secondOnly,
}: {
  firstOnly: number
  secondOnly: number
}): McnemarTest {
  requireCount(firstOnly, 'Each count')
  requireCount(secondOnly, 'Each count')
  const n = firstOnly + secondOnly
  if (n === 0) {
    const sentence = 'The two tests never disagree, so there is nothing to test.'
    const nothing = { chiSquared: null, p: null, chiSquaredContinuity: null }
    return { exactP: 1, midP: 0.5, ...nothing, notDefined: { code: 'zero-denominator', sentence } }
  }
  const smaller = Math.min(firstOnly, secondOnly)
  const { cdf, mass } = fairBinomial(smaller, n)
  const gap = Math.abs(firstOnly - secondOnly)
  const chiSquared = (gap * gap) / n
  return {
    exactP: Math.min(1, 2 * cdf),
    midP: gap === 0 ? 1 - mass / 2 : 2 * cdf - mass,
    chiSquared,
    p: chiSquaredUpperTail(chiSquared, 1),
    chiSquaredContinuity: Math.max(0, gap - 1) ** 2 / n,
    notDefined: null,
  }
}
