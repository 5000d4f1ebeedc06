import { regularisedBeta } from './regularisedBeta.ts'

/** P(T > t) for Student's t with `degreesOfFreedom` > 0. Source: NIST DLMF 8.17; Student 1908. */
export function studentTUpperTail(t: number, degreesOfFreedom: number): number {
  const square = t * t
  const x = degreesOfFreedom / (degreesOfFreedom + square)
  const y = square / (degreesOfFreedom + square)
  const beta = regularisedBeta(x, y, degreesOfFreedom / 2, 0.5)
  return t > 0 ? beta.lower / 2 : 0.5 + beta.upper / 2
}
