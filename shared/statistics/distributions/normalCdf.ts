import { normalUpperTail } from './normalUpperTail.ts'

/** P(Z ≤ z) for a standard normal Z. */
export function normalCdf(z: number): number {
  return normalUpperTail(-z)
}
