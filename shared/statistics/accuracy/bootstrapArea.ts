import type { Interval, LevelOption } from '../Interval.ts'
import { percentileInterval } from '../random/percentileInterval.ts'
import { pointOfEach } from '../random/pointOfEach.ts'
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
  const points = curve.truePositives.length
  const pointOfPresent = pointOfEach(curve.truePositives)
  const pointOfAbsent = pointOfEach(curve.falsePositives)
  const present = new Int32Array(points)
  const absent = new Int32Array(points)
  const areas = new Float64Array(replicates)
  for (let r = 0; r < replicates; r++) {
    draw(present, pointOfPresent, random)
    draw(absent, pointOfAbsent, random)
    areas[r] = areaFromCounts(present, absent, curve.nPresent, curve.nAbsent)
    if (r % 100 === 99) onProgress?.((r + 1) / replicates)
  }
  const method = 'bootstrap, stratified, percentile' as const
  return { ...percentileInterval(areas, level), replicates, seed, method }
}

function draw(counts: Int32Array, pointOf: Int32Array, random: () => number): void {
  counts.fill(0)
  const n = pointOf.length
  for (let i = 0; i < n; i++) counts[pointOf[Math.floor(random() * n)]!]!++
}

function areaFromCounts(present: Int32Array, absent: Int32Array, m: number, n: number): number {
  let absentAbove = 0
  let twiceWins = 0
  for (let k = 1; k < present.length; k++) {
    twiceWins += present[k]! * (2 * (n - absentAbove) - absent[k]!)
    absentAbove += absent[k]!
  }
  return twiceWins / (2 * m * n)
}
