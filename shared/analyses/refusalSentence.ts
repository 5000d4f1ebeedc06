import type { StatisticsError, StatisticsErrorCode } from '#shared/statistics/StatisticsError.ts'

/** What somebody can do about a refusal. */
const ADVICE: Partial<Record<StatisticsErrorCode, string>> = {
  'one-class':
    'Choose another analyte, or look at Reference whether the outcomes were coded as meant.',
  'too-few': 'Choose another analyte, or see in the counts which values are missing.',
  constant: 'Leave that analyte out, or choose another.',
  'different-units':
    'Choose the reference values of the same analyte, or look at the rank correlation instead: it tells whether subjects with more of the one have more of the other.',
  separation:
    'So the coefficients have no estimate. Leave out the analyte that separates them and look at it by itself under Accuracy, or wait for more subjects.',
  collinear: 'Leave one of the analytes that say the same out of the panel.',
  'no-convergence': 'Use fewer analytes, or logarithms where values spread widely.',
}

/** Why the figures cannot be computed, and what to do about it. */
export function refusalSentence({ code, message }: StatisticsError): string {
  const advice = ADVICE[code]
  return advice ? `${message} ${advice}` : message
}
