import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { readNumber } from '#shared/breath/file/readNumber.ts'
import { readPlainRow } from '#shared/breath/file/readPlainRow.ts'
import { seededNoise } from './support/seededNoise.ts'

const encoder = new TextEncoder()
const numberOf = (text: string) => {
  const bytes = encoder.encode(text)
  return readNumber(bytes, 0, bytes.length)
}

const digits = (most: number) =>
  fc
    .array(fc.integer({ min: 0, max: 9 }), { minLength: 1, maxLength: most })
    .map((all) => all.join(''))
const sign = fc.constantFrom('', '-', '+')

/** Plain decimals of any length, with or without fraction and exponent. */
const decimal = fc
  .tuple(
    sign,
    fc.oneof(
      digits(25),
      fc.tuple(digits(20), digits(25)).map(([whole, part]) => `${whole}.${part}`),
      digits(12).map((whole) => `${whole}.`),
      digits(20).map((part) => `.${part}`),
    ),
    fc.oneof(
      fc.constant(''),
      fc
        .tuple(fc.constantFrom('e', 'E'), sign, fc.integer({ min: 0, max: 340 }))
        .map((parts) => parts.join('')),
    ),
  )
  .map((parts) => parts.join(''))

test('a plain decimal of any length reads as Number() reads it', () => {
  void fc.assert(
    fc.property(decimal, (text) => {
      expect(Object.is(numberOf(text), Number(text))).toBe(true)
    }),
    { numRuns: 5000 },
  )
})

test('every double that prints as a plain decimal reads back as itself', () => {
  void fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      expect(numberOf(String(value))).toBe(Number(String(value)))
    }),
    { numRuns: 2000 },
  )
})

test('decimals of 14 to 20 digits round as Number() rounds them, a hundred thousand times over', () => {
  const next = seededNoise(20_250_304)
  const digit = () => Math.floor(((next() + 1) / 2) * 10)
  for (let i = 0; i < 100_000; i++) {
    const length = 14 + (i % 7)
    const all = Array.from({ length }, digit).join('')
    const point = i % (length + 1)
    const text = `${all.slice(0, point)}.${all.slice(point)}`
    if (!Object.is(numberOf(text), Number(text))) expect.fail(text)
  }
})

test('decimals halfway between two doubles, and one digit beside it, round as Number() rounds them', () => {
  // k + 1/2 for odd and even k of 53 bits, written out: 2^52 + n + 0.5.
  for (let n = 0; n < 2000; n++) {
    const whole = 4_503_599_627_370_496n + BigInt(n)
    for (const part of ['.5', '.49', '.51', '.50', '.4']) {
      const text = `${whole}${part}`
      if (!Object.is(numberOf(text), Number(text))) expect.fail(text)
    }
  }
})

test('whatever is no plain decimal is not a number, and whatever is one is', () => {
  const plain = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/
  const pieces = fc.constantFrom('0', '7', '12', '.', '-', '+', 'e', 'E', 'x', ' ', ',', 'Infinity')
  void fc.assert(
    fc.property(fc.array(pieces, { maxLength: 6 }), (parts) => {
      const text = parts.join('')
      expect(Number.isNaN(numberOf(text))).toBe(!plain.test(text))
    }),
    { numRuns: 5000 },
  )
})

describe('numbers that try the rounding', () => {
  test.each([
    '9007199254740993',
    '0.1',
    '123456789012345',
    '1e23',
    '8.5e22',
    '5e-324',
    '2.2250738585072011e-308',
    '1.7976931348623159e308',
    '0e999999999',
    '1e-999999999',
    '0.30000000000000004',
    '-0',
    '000123.4500',
  ])('%s reads as Number() reads it', (text) => {
    expect(Object.is(numberOf(text), Number(text))).toBe(true)
  })
})

test('a line of decimals up to 18 digits reads the quick way as Number() reads its cells', () => {
  const cell = fc
    .tuple(fc.boolean(), digits(18), fc.integer({ min: 0, max: 18 }))
    .map(([isNegative, all, point]) => {
      const decimals = Math.min(point, all.length)
      const whole = all.slice(0, all.length - decimals)
      return `${isNegative ? '-' : ''}${whole}${decimals ? `.${all.slice(all.length - decimals)}` : ''}`
    })
  void fc.assert(
    fc.property(
      fc.array(cell, { minLength: 1, maxLength: 9 }),
      fc.constantFrom('\n', '\r\n'),
      (cells, end) => {
        const bytes = encoder.encode(`${cells.join(',')}${end}`)
        const row = new Float64Array(cells.length)
        expect(readPlainRow(bytes, 0, row)).toBe(bytes.length)
        expect([...row].every((value, i) => Object.is(value, Number(cells[i])))).toBe(true)
      },
    ),
    { numRuns: 3000 },
  )
})

test.each([
  '1,2',
  '1,2,3,4',
  '1,,3',
  '1,2,x',
  '1,2,3e1',
  ' 1,2,3',
  '1,2,1234567890123456789',
  '+1,2,3',
  '1,2,3;',
  '',
])('the quick way leaves the line "%s" to the careful one', (line) => {
  expect(readPlainRow(encoder.encode(`${line}\n`), 0, new Float64Array(3))).toBe(-1)
})
