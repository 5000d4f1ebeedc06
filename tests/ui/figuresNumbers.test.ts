import { expect, test } from 'vitest'
import {
  formatConcentration,
  formatCount,
  formatDate,
  formatEstimate,
  formatFraction,
  formatInstant,
  formatInterval,
  formatPercent,
  formatProbability,
} from '#shared/terms/numbers.ts'

test('an estimate keeps its decimals and its true minus sign', () => {
  expect(formatEstimate(0.8421)).toBe('0.842')
  expect(formatEstimate(-12.5, 1)).toBe('−12.5')
  expect(formatEstimate(1, 3)).toBe('1.000')
  expect(formatEstimate(1234.5678, 1)).toBe('1,234.6')
})

test('a number that rounds to nought carries no sign', () => {
  expect(formatEstimate(-0.0001)).toBe('0.000')
  expect(formatEstimate(-0)).toBe('0.000')
})

test('what cannot be estimated is said in words', () => {
  expect(formatEstimate(null)).toBe('not estimable')
  expect(formatEstimate(Number.NaN)).toBe('not estimable')
  expect(formatEstimate(Number.POSITIVE_INFINITY)).toBe('infinite')
  expect(formatInterval(null, 0.4)).toBe('not estimable')
})

test('an interval reads "lower to upper"', () => {
  expect(formatInterval(0.7812, 0.8894)).toBe('0.781 to 0.889')
  expect(formatInterval(2.337, Number.POSITIVE_INFINITY, 2)).toBe('2.34 to infinite')
})

test('a count has thousands and refuses a broken number', () => {
  expect(formatCount(17978)).toBe('17,978')
  expect(formatFraction(64, 77)).toBe('64/77')
  expect(() => formatCount(1.5)).toThrow(RangeError)
})

test('a concentration never loses a digit before the point', () => {
  expect(formatConcentration(1180)).toBe('1,180')
  expect(formatConcentration(17978)).toBe('17,978')
  expect(formatConcentration(1184.37)).toBe('1,184')
  expect(formatConcentration(62.5)).toBe('62.5')
  expect(formatConcentration(0.0123456)).toBe('0.01235')
  expect(formatConcentration(999.96)).toBe('1,000')
  expect(formatConcentration(0)).toBe('0')
  expect(formatConcentration(-3.25)).toBe('−3.25')
})

test('percent and p values are written one way', () => {
  expect(formatPercent(0.8312)).toBe('83.1 %')
  expect(formatProbability(0.0421)).toBe('0.042')
  expect(formatProbability(0.00004)).toBe('< 0.001')
})

test('an instant is written in UTC and says so', () => {
  expect(formatInstant('2026-10-14T11:52:09.000Z')).toBe('14 Oct 2026 11:52 UTC')
  expect(formatInstant('2026-09-01T01:30:00+02:00')).toBe('31 Aug 2026 23:30 UTC')
  expect(formatDate('2026-09-30')).toBe('30 Sep 2026')
  expect(() => formatInstant('yesterday')).toThrow(RangeError)
})
