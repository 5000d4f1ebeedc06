import fc from 'fast-check'
import { expect, test } from 'vitest'
import { readNumber } from '../../src/forms/readNumber.ts'

test('a blank box is no value, never nought', () => {
  expect(readNumber('')).toEqual({ value: undefined })
  expect(readNumber('   ')).toEqual({ value: undefined })
})

test.each([
  ['12.5', 12.5],
  [' 0 ', 0],
  ['-3', -3],
  ['−3.25', -3.25],
  ['.5', 0.5],
  ['1e-3', 0.001],
  ['17 978', 17978],
  ['17\u202f978.5', 17978.5],
])('reads %s as %d', (text, value) => {
  expect(readNumber(text)).toEqual({ value })
})

test('a number with a comma is refused, and the two ways to read it are named', () => {
  expect(readNumber('1,180').problem).toBe('"1,180" can be read in two ways. Write 1180 or 1.180.')
})

test.each(['0,5', '1,234,567', '12,3456', ',5'])('refuses %s, which holds a comma', (text) => {
  expect(readNumber(text).problem).toContain('without a comma')
})

test.each(['abc', '5 ppb', '1.2.3', '12 34', '0x10', 'Infinity', '--1', '1e999'])(
  'refuses %s and says what was typed',
  (text) => {
    const reading = readNumber(text)
    expect(reading.value).toBeUndefined()
    expect(reading.problem).toContain(`"${text}"`)
  },
)

test('every finite number that JavaScript prints is read back as itself', () => {
  // The property is synchronous: there is no promise to wait for.
  void fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      // Minus zero is written 0.
      expect(readNumber(String(value)).value).toBe(value + 0)
    }),
  )
})
