export const SEXES = ['F', 'M', 'other', 'unknown'] as const
export type Sex = (typeof SEXES)[number]
export const SEX_LABELS: Record<Sex, string> = {
  F: 'Female',
  M: 'Male',
  other: 'Other',
  unknown: 'Not recorded',
}

/** Five-year bands; everybody of 90 and over is one band, so that nobody is singled out by age. */
export const FIVE_YEAR_BANDS = [
  '0-4',
  '5-9',
  '10-14',
  '15-19',
  '20-24',
  '25-29',
  '30-34',
  '35-39',
  '40-44',
  '45-49',
  '50-54',
  '55-59',
  '60-64',
  '65-69',
  '70-74',
  '75-79',
  '80-84',
  '85-89',
  '90+',
] as const

/** Earlier data that say no more than "80 and over" or "85 and over": kept as said, never put into a narrower band. */
export const OPEN_BANDS = ['80+', '85+'] as const

export const AGE_BANDS = [...FIVE_YEAR_BANDS, ...OPEN_BANDS] as const
export type AgeBand = (typeof AGE_BANDS)[number]

/** The five-year band of an age in years (0 to 130), or null. */
export function ageBandOf(ageYears: number): AgeBand | null {
  if (!Number.isFinite(ageYears) || ageYears < 0 || ageYears > 130) return null
  return FIVE_YEAR_BANDS[Math.min(Math.floor(ageYears / 5), FIVE_YEAR_BANDS.length - 1)] ?? null
}
