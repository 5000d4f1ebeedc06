import type { Interval, LevelOption } from '../Interval.ts'
import { countResampler } from '../random/countResampler.ts'
import { percentileInterval } from '../random/percentileInterval.ts'
import type { Resampling } from '../random/Resampling.ts'
import { randomStream } from '../random/randomStream.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import type { RocCurve } from './rocCurve.ts'

export type BootstrapArea = Interval & {
  standardError: number
  replicates: number
  seed: number
  method: 'bootstrap, stratified, percentile'
}

/**
 * Percentile interval of the area from a bootstrap stratified by outcome. The curve's points stay
 * sorted, so each replicate costs one draw a subject and one pass.
 * @param curve from rocCurve
 * @throws StatisticsError 'out-of-range'
 * Source: Efron & Tibshirani 1993; Carpenter & Bithell 2000, Stat Med 19:1141.
 */
export function bootstrapArea(
  curve: RocCurve,
  { level = 0.95, seed, replicates = 2000, onProgress }: LevelOption & Resampling,
): BootstrapArea {
  requireCount(replicates, 'The number of replicates', 2)
  requireProbability(level, 'The confidence level')
  const random = randomStream(seed)
  const drawPresent = countResampler(curve.truePositives, random)
  const drawAbsent = countResampler(curve.falsePositives, random)
  const areas = new Float64Array(replicates)
  for (let r = 0; r < replicates; r++) {
    areas[r] = areaAlong(drawPresent(), drawAbsent())
    if (r % 100 === 99) onProgress?.((r + 1) / replicates)
  }
  const method = 'bootstrap, stratified, percentile' as const
  return { ...percentileInterval(areas, level), replicates, seed, method }
}

/** Area from counts along a curve, in whole numbers up to the last division. */
function areaAlong(present: Int32Array, absent: Int32Array): number {
  const last = present.length - 1
  const m = present[last]!
  const n = absent[last]!
  let twiceWins = 0
  for (let k = 1; k <= last; k++) {
    twiceWins += (present[k]! - present[k - 1]!) * (2 * n - absent[k]! - absent[k - 1]!)
  }
  return twiceWins / (2 * m * n)
}
