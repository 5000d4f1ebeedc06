import { expect } from 'vitest'
import { StatisticsError, type StatisticsErrorCode } from '#shared/statistics/StatisticsError.ts'

/** Expects a coded refusal with a sentence a person can read. */
export function expectRefusal(ask: () => unknown, code: StatisticsErrorCode): void {
  let refusal: unknown
  try {
    ask()
  } catch (error) {
    refusal = error
  }
  expect(refusal).toBeInstanceOf(StatisticsError)
  const { code: given, message } = refusal as StatisticsError
  expect(given).toBe(code)
  expect(message).toMatch(/^[A-Z"“].{10,}\.$/s)
}
