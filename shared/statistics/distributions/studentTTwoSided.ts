import { studentTUpperTail } from './studentTUpperTail.ts'

/** Two-sided p of a t statistic. */
export function studentTTwoSided(t: number, degreesOfFreedom: number): number {
  return Math.min(1, 2 * studentTUpperTail(Math.abs(t), degreesOfFreedom))
}
