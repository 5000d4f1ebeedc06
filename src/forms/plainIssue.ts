import type { z } from 'zod'

type Issue = z.core.$ZodRawIssue

const FORMATS: Record<string, string> = {
  email: 'Give an e-mail address, such as somebody@hospital.example.',
  date: 'Give a date as year, month and day, such as 2026-03-31.',
  datetime: 'Give a date and a time.',
  url: 'Give a web address that begins with https://.',
  uuid: 'This is not the identifier of a record.',
}

/** Says in plain words what a schema refuses; a schema's own sentence comes before it. */
export function plainIssue(issue: Issue): string {
  if (isBlank(issue.input)) return issue.code === 'invalid_value' ? 'Choose one.' : 'Fill this in.'
  switch (issue.code) {
    case 'invalid_type':
      return wrongType(issue.expected)
    case 'invalid_format':
      return FORMATS[issue.format] ?? 'This is not in the form that is asked for.'
    case 'invalid_value':
      return 'Choose one of the answers.'
    case 'too_small':
      return tooSmall(issue.origin, Number(issue.minimum), issue.inclusive !== false)
    case 'too_big':
      return tooBig(issue.origin, Number(issue.maximum), issue.inclusive !== false)
    case 'not_multiple_of':
      return `Give a multiple of ${issue.divisor}.`
    default:
      return 'This entry is not understood.'
  }
}

function isBlank(input: unknown): boolean {
  return input === undefined || input === null || input === ''
}

function wrongType(expected: string): string {
  if (expected === 'int') return 'Give a whole number.'
  if (expected === 'number') return 'Give a number.'
  if (expected === 'date') return 'Give a date.'
  return 'This entry is not understood.'
}

function tooSmall(origin: string, minimum: number, inclusive: boolean): string {
  if (origin === 'string') return `Write at least ${minimum} characters.`
  if (origin === 'array' || origin === 'set') return `Give at least ${minimum}.`
  return inclusive ? `Give ${minimum} or more.` : `Give more than ${minimum}.`
}

function tooBig(origin: string, maximum: number, inclusive: boolean): string {
  if (origin === 'string') return `Write at most ${maximum} characters.`
  if (origin === 'array' || origin === 'set') return `Give at most ${maximum}.`
  return inclusive ? `Give ${maximum} or less.` : `Give less than ${maximum}.`
}
