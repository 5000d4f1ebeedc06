import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'

/**
 * Newcombe's method 5: the areas that a score test with the Hanley–McNeil variance does not reject.
 * Both class sizes less one are replaced by their mean, (m + n)/2 − 1. It stays inside 0…1 and is
 * defined at an area of 0 or 1, where DeLong's variance is 0.
 * @param area 0…1  @param nPresent, nAbsent at least 1
 * @throws StatisticsError 'out-of-range'
 * Source: Newcombe 2006, Stat Med 25:559 (part 2), method 5; formula quoted from memory.
 */
export function newcombeAreaInterval(
  { area, nPresent, nAbsent }: { area: number; nPresent: number; nAbsent: number },
  { level = 0.95 }: LevelOption = {},
): Interval {
  requireCount(nPresent, 'The number with the condition', 1)
  requireCount(nAbsent, 'The number without the condition', 1)
  if (!(area >= 0 && area <= 1)) {
    throw new StatisticsError('out-of-range', 'An area lies between 0 and 1.')
  }
  const z = zFor(level)
  const size = (nPresent + nAbsent) / 2 - 1
  /** How far θ lies from the area, in standard errors at θ, less z. */
  const beyond = (theta: number): number => {
    const spread = (size * (1 - theta)) / (2 - theta) + (size * theta) / (1 + theta)
    const variance = (theta * (1 - theta) * (1 + spread)) / (nPresent * nAbsent)
    return (area - theta) ** 2 - z * z * variance
  }
  return {
    lower: area === 0 ? 0 : boundary(beyond, 0, area),
    upper: area === 1 ? 1 : boundary(beyond, 1, area),
  }
}

/** Halves the way between a rejected and an accepted value until they are neighbours. */
function boundary(beyond: (theta: number) => number, rejected: number, accepted: number): number {
  let outside = rejected
  let inside = accepted
  for (let step = 0; step < 200; step++) {
    const middle = (outside + inside) / 2
    if (middle === outside || middle === inside) break
    if (beyond(middle) > 0) outside = middle
    else inside = middle
  }
  return inside
}
