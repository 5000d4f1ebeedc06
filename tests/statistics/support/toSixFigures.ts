import { expect } from 'vitest'

/** Agrees to the six significant figures that worked values are printed with. */
export function toSixFigures(actual: number, printed: number): void {
  expect(Math.abs(actual - printed)).toBeLessThanOrEqual(5.1e-6 * Math.abs(printed))
}
