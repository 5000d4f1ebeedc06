import { normalUpperTail } from './normalUpperTail.ts'

/** Two-sided p of a standard normal statistic. */
export function normalTwoSided(z: number): number {
  return Math.min(1, 2 * normalUpperTail(Math.abs(z)))
}
