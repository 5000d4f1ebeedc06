import { normalTwoSided } from '../distributions/normalTwoSided.ts'
import type { NotDefined } from '../NotDefined.ts'

export type AreaTest = { z: number | null; p: number | null; notDefined: NotDefined | null }

/**
 * Tests an area against 0.5 (or another value): z = (area − null)/SE, two-sided normal p.
 * @param estimate area and standard error from delongArea or clusteredArea
 * @param nullArea 0.5 unless given
 * Source: DeLong, DeLong & Clarke-Pearson 1988.
 */
export function testAgainstHalf(
  { area, standardError }: { area: number; standardError: number | null },
  nullArea = 0.5,
): AreaTest {
  if (standardError === null || standardError === 0) {
    const code = standardError === null ? 'too-few' : 'zero-variance'
    const sentence = 'The variance of the area cannot be estimated, so the test cannot be done.'
    return { z: null, p: null, notDefined: { code, sentence } }
  }
  const z = (area - nullArea) / standardError
  return { z, p: normalTwoSided(z), notDefined: null }
}
