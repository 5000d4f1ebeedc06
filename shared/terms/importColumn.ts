import type { Delimiter, Meaning, Suspicion } from '#shared/schemas/import.ts'

/** What a column may mean. */
export const MEANING_LABELS: Record<Meaning, string> = {
  leaveOut: 'Left out',
  subject: 'Subject',
  site: 'Site',
  sessionNumber: 'Session number',
  sex: 'Sex',
  ageYears: 'Age in years',
  ageBand: 'Age band',
  sensorValue: 'Sensor value',
  belowLod: 'Sensor value below LoD: yes or no',
  referenceValue: 'Reference analyser value',
  outcome: 'Reference outcome',
  covariate: 'Covariate',
}

/** The meanings as they are offered, beside leaving a column out. */
export const MEANING_GROUPS: readonly { label: string; meanings: readonly Meaning[] }[] = [
  { label: 'Whose row it is', meanings: ['subject', 'site', 'sessionNumber'] },
  { label: 'About the subject', meanings: ['sex', 'ageYears', 'ageBand', 'covariate'] },
  { label: 'Sensor', meanings: ['sensorValue', 'belowLod'] },
  { label: 'Reference', meanings: ['referenceValue', 'outcome'] },
]

/** As in "This column looks like names". */
export const SUSPICION_WORDS: Record<Suspicion, string> = {
  name: 'names',
  dateOfBirth: 'dates, perhaps of birth',
  recordNumber: 'record numbers',
  contact: 'contact details',
  freeText: 'free text',
}

export const DELIMITER_LABELS: Record<Delimiter, string> = {
  ',': 'Comma',
  ';': 'Semicolon',
  '\t': 'Tab',
}
