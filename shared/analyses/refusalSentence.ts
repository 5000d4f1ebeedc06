import type { StatisticsError, StatisticsErrorCode } from '#shared/statistics/StatisticsError.ts'

/** What somebody can do about a refusal. */
const ADVICE: Partial<Record<StatisticsErrorCode, string>> = {
  'one-class':
    'Choose another analyte, or look at Reference whether the outcomes were coded as meant.',
  'too-few': 'Choose another analyte, or see in the counts which values are missing.',
}

/** Why the figures cannot be computed, and what to do about it. */
export function refusalSentence({ code, message }: StatisticsError): string {
  const advice = ADVICE[code]
  return advice ? `${message} ${advice}` : message
}
