import { expect } from 'vitest'

/** Asserts that a value, rounded to six significant figures, is the expected one. */
export function expectSixFigures(value: number | null | undefined, expected: number): void {
  expect(Number(value?.toPrecision(6))).toBe(Number(expected.toPrecision(6)))
}
