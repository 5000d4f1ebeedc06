import { type AgeBand, SEX_LABELS, type Sex } from '#shared/terms/subject.ts'

/** "50–54" */
export const ageBandWords = (band: AgeBand | null): string =>
  band === null ? 'Not recorded' : band.replace('-', '–')

export const sexWords = (sex: Sex | null): string =>
  sex === null ? SEX_LABELS.unknown : SEX_LABELS[sex]

/** As short as a column: F, M, or in words. */
export const sexMark = (sex: Sex | null): string =>
  sex === 'F' || sex === 'M' ? sex : sexWords(sex)

/** Said wherever subjects are listed or entered. */
export const PRIVACY_WORDS =
  'No names, dates of birth or hospital numbers here. The key to these codes stays in your site file.'
