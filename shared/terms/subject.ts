export const SEXES = ['F', 'M', 'other', 'unknown'] as const
export type Sex = (typeof SEXES)[number]
export const SEX_LABELS: Record<Sex, string> = {
  F: 'Female',
  M: 'Male',
  other: 'Other',
  unknown: 'Not recorded',
}

/** Five-year bands; everybody of 90 and over is one band, so that nobody is singled out by age. */
export const AGE_BANDS = [
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
export type AgeBand = (typeof AGE_BANDS)[number]

/** The band of an age in whole years (0 to 130), or null. */
export function ageBandOf(ageYears: number): AgeBand | null {
  if (!Number.isFinite(ageYears) || ageYears < 0 || ageYears > 130) return null
  return AGE_BANDS[Math.min(Math.floor(ageYears / 5), AGE_BANDS.length - 1)] ?? null
}
