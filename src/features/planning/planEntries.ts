import type { Entry } from '../../forms/entries.ts'

/** Boxes that several questions have, with what they take and a sensible start. */

const strictlyInside = (value: number) =>
  value > 0 && value < 1 ? null : 'Above 0 and below 1, such as 0.9.'

const areaBounds = (value: number) =>
  value >= 0.5 && value < 1 ? null : 'An area is planned from 0.5 to below 1, such as 0.8.'

const wholeFrom = (least: number) => (value: number) =>
  Number.isSafeInteger(value) && value >= least ? null : `A whole number from ${least} on.`

type Words = Pick<Entry, 'label' | 'start'> & Partial<Pick<Entry, 'hint' | 'unit'>>

/** The optional boxes say so in their type, so that their values may be missing. */
type OptionalEntry = Entry & { optional: true }
type NeededEntry = Entry & { optional?: false }

export const areaEntry = (words: Words): NeededEntry => ({
  ...words,
  optional: false,
  refuse: areaBounds,
})

export const shareEntry = (words: Words): NeededEntry => ({
  ...words,
  optional: false,
  refuse: strictlyInside,
})

export const countEntry = (words: Words, least = 0): NeededEntry => ({
  ...words,
  optional: false,
  refuse: wholeFrom(least),
})

export const numberEntry = (words: Words): NeededEntry => ({ ...words, optional: false })

export const positiveEntry = (words: Words): NeededEntry => ({
  ...words,
  optional: false,
  refuse: (value) => (value > 0 ? null : 'Above 0.'),
})

export const notNegativeEntry = (words: Words): NeededEntry => ({
  ...words,
  optional: false,
  refuse: (value) => (value >= 0 ? null : '0 or more.'),
})

export const POWER = shareEntry({
  label: 'Power',
  start: '0.9',
  hint: 'Chance to succeed when the assumption is true',
})

export const ALPHA: NeededEntry = {
  label: 'Significance level',
  start: '0.05',
  hint: 'Two-sided',
  optional: false,
  refuse: (value) => (value > 0 && value <= 0.5 ? null : 'Above 0 and at most 0.5, such as 0.05.'),
}

export const LEVEL = shareEntry({
  label: 'Confidence level',
  start: '0.95',
  hint: 'Of the two-sided interval',
})

export const ABSENT_PER_PRESENT = positiveEntry({
  label: 'Absent per present',
  start: '1',
  hint: 'Subjects without the condition for each one with it',
})

export const REACH: OptionalEntry = {
  label: 'Present you can reach',
  start: '',
  unit: 'subjects',
  hint: 'The power of a smaller study',
  optional: true,
  refuse: wholeFrom(2),
}

export const PREVALENCE: OptionalEntry = {
  label: 'Prevalence',
  start: '',
  hint: 'Share with the condition among those enrolled in order; blank where subjects are chosen by outcome',
  optional: true,
  refuse: strictlyInside,
}

export const WITHOUT_RESULT: OptionalEntry = {
  label: 'Without a valid result',
  start: '',
  unit: '%',
  hint: 'Withdrawn, failed sessions, no reference outcome',
  optional: true,
  refuse: (value) => (value >= 0 && value < 100 ? null : 'From 0 to below 100 %.'),
}

/** The boxes that turn subjects analysed into subjects enrolled. */
export const ENROLMENT = { prevalence: PREVALENCE, withoutResult: WITHOUT_RESULT }
