import { normalQuantile } from '../distributions/normalQuantile.ts'
import { zFor } from '../distributions/zFor.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { type FloorPlan, type FloorPower, floorPower } from './floorPower.ts'

export type FloorSampleSize = FloorPower & {
  n: number
  /** The smallest number that reaches the power at all, although a larger one may fall short of it. */
  firstToReach: number
}

/** Beyond this a plan is not practicable, and the search would take too long. */
const MOST = 100_000

/**
 * Subjects of a class for a success criterion on one proportion. The exact power rises in a saw-tooth, so
 * that one more subject can lower it: this is the smallest number from which on it stays at or above the
 * power wanted, looked at up to 1.5 times that number and 100 more.
 * @param options `onProgress` is told the share done; throw in it to cancel
 * @throws StatisticsError 'out-of-range', also where 100,000 subjects are not enough
 * Source: see floorPower; Chu & Cole 2007 for the saw-tooth.
 */
export function floorSampleSize(
  plan: FloorPlan & { power: number },
  { onProgress }: { onProgress?: (share: number) => void } = {},
): FloorSampleSize {
  requireProbability(plan.power, 'The power')
  let found: Omit<FloorSampleSize, 'firstToReach'> | null = null
  let firstToReach: number | null = null
  let least = 0
  let horizon = 1.5 * roughSize(plan) + 100
  for (let n = 1; n <= horizon; n++) {
    const reached = floorPower(plan, n, least)
    least = Math.min(reached.least, n)
    if (reached.power < plan.power) found = null
    else {
      found ??= { n, ...reached }
      firstToReach ??= n
    }
    horizon = Math.max(horizon, 1.5 * (found?.n ?? n + 1) + 100)
    if (horizon > 2 * MOST) {
      throw new StatisticsError('out-of-range', 'No sample of a practicable size is enough.')
    }
    if (n % 256 === 0) onProgress?.(n / horizon)
  }
  return { ...found!, firstToReach: firstToReach! }
}

/** By the normal approximation: where to expect the answer. */
function roughSize({
  expected,
  floor,
  level = 0.95,
  power,
}: FloorPlan & { power: number }): number {
  if (!(floor < expected)) floorPower({ expected, floor }, 1)
  const spread =
    zFor(level) * Math.sqrt(floor * (1 - floor)) +
    normalQuantile(power) * Math.sqrt(expected * (1 - expected))
  return (spread / (expected - floor)) ** 2
}
