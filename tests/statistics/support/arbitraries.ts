import fc from 'fast-check'
import type { Classes, Direction } from '#shared/statistics/accuracy/Classes.ts'

/** Few distinct values, so that ties are the rule. */
const tiedValue = fc.integer({ min: 0, max: 12 })
const anyValue = fc.double({ min: -1e6, max: 1e6, noNaN: true })
const direction = fc.constantFrom<Direction>('higher', 'lower')

function classesOf(value: fc.Arbitrary<number>, least: number): fc.Arbitrary<Classes> {
  const values = fc.array(value, { minLength: least, maxLength: 30 })
  return fc.record({ present: values, absent: values, direction })
}

export const someClasses = fc.oneof(classesOf(tiedValue, 2), classesOf(anyValue, 2))
export const tinyClasses = fc.oneof(classesOf(tiedValue, 1), classesOf(anyValue, 1))

/** Pairs whose differences vary, sizes as readings have them. */
export const somePairs = fc
  .array(
    fc.tuple(
      fc.double({ min: 1, max: 1000, noNaN: true }),
      fc.double({ min: -20, max: 20, noNaN: true }),
    ),
    { minLength: 5, maxLength: 40 },
  )
  .map((rows) => ({
    first: rows.map(([size]) => size),
    second: rows.map(([size, gap], i) => size + gap + 30 + (i % 3)),
  }))

export const someTable = fc
  .tuple(fc.nat(40), fc.nat(40), fc.nat(40), fc.nat(40))
  .map(([truePositives, falsePositives, falseNegatives, trueNegatives]) => ({
    truePositives,
    falsePositives,
    falseNegatives,
    trueNegatives,
  }))
