import { StatisticsError } from '../StatisticsError.ts'
import type { Standards } from './calibrationLine.ts'

export type BackCalculated = {
  level: number
  readings: number
  mean: number
  /** 100·(mean − level)/level; null at a level of 0. */
  relativeErrorPercent: number | null
}

/**
 * What a calibration line makes of its own standards: the mean of (signal − intercept)/slope at each
 * level, lowest first, and its relative error.
 * @throws StatisticsError 'constant' (a slope of 0), 'unequal-length'
 */
export function backCalculated(
  { levels, signals }: Standards,
  line: { intercept: number; slope: number },
): BackCalculated[] {
  if (levels.length !== signals.length) {
    throw new StatisticsError('unequal-length', 'Each level needs its signal.')
  }
  if (line.slope === 0) throw new StatisticsError('constant', 'The line has no slope.')
  const sums = new Map<number, { sum: number; readings: number }>()
  for (let i = 0; i < levels.length; i++) {
    const entry = sums.get(levels[i]!) ?? { sum: 0, readings: 0 }
    entry.sum += (signals[i]! - line.intercept) / line.slope
    entry.readings += 1
    sums.set(levels[i]!, entry)
  }
  return [...sums]
    .sort(([a], [b]) => a - b)
    .map(([level, { sum, readings }]) => {
      const mean = sum / readings
      const relativeErrorPercent = level === 0 ? null : (100 * (mean - level)) / level
      return { level, readings, mean, relativeErrorPercent }
    })
}
