import { StatisticsError } from '#shared/statistics/StatisticsError.ts'

/** The answer, or null where the product refuses with a coded error. */
export function orNull<T>(ask: () => T): T | null {
  try {
    return ask()
  } catch (error) {
    if (error instanceof StatisticsError) return null
    throw error
  }
}
