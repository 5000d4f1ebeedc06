import type { Suspicion } from '#shared/schemas/import.ts'

/**
 * What could identify somebody, by heading and by value: names, dates of birth, record numbers,
 * contacts, free text (after the list of HIPAA 45 CFR 164.514(b)(2)). It errs on the side of asking.
 */
const HEADINGS: readonly [Suspicion, RegExp][] = [
  [
    'contact',
    /\b(e ?mails?|phones?|telephones?|tel|mobile|fax|address|street|post ?code|zip|postal|contact)\b/,
  ],
  ['dateOfBirth', /\b(dob|birth|birthday|born|birth ?date|date of birth)\b/],
  [
    'recordNumber',
    /\b(mrn|nhs|ssn|chi|passport|insurance|hospital (no|nr|number|id)|patient (no|nr|number|id)|(medical )?record (no|nr|number)|case (no|nr|number)|accession|chart)\b/,
  ],
  ['freeText', /\b(comments?|notes?|remarks?|free ?text|description|details|narrative|history)\b/],
  [
    'name',
    /\b(surname|forename|first ?name|last ?name|full ?name|initials|(patient|subject|participant|given|family|middle) name|name|names)\b/,
  ],
]
/** Things that have names without being people. */
const NAMES_OF_THINGS = /\b(site|hospital|clinic|ward|device|sensor|analyte|gas|drug|file) name\b/

const EMAIL = /[^\s@]+@[^\s@]+\.[^\s@]{2,}/
const PHONE = /^(\+\d|0\d|\(0)[\d\s()/.-]{7,}$/
const DATE = /^(\d{4}[-/.]\d{1,2}[-/.]\d{1,2}|\d{1,2}[-/.]\d{1,2}[-/.](\d{4}|\d{2}))([T\s].*)?$/
const RECORD_NUMBER = /^[A-Z]{0,3}[-\s]?\d{7,}$/i
const TITLED = /\b(mr|mrs|ms|miss|dr|prof)\.? +\p{Lu}/iu
const COMMA_NAME = /^\p{Lu}[\p{L}'-]+, ?\p{Lu}[\p{L}'-]*\.?$/u
const TWO_NAMES = /^\p{Lu}[\p{Ll}'-]+( \p{Lu}\.?)? \p{Lu}[\p{L}'-]+$/u

/** Patterns look at the beginning alone: what is longer is free text anyway, and time stays bounded. */
const LOOKED_AT = 120

/** Why a single value must not be kept as text; null where it looks harmless. */
export function suspicionOfValue(text: string): Suspicion | null {
  const value = text.slice(0, LOOKED_AT)
  if (value.includes('@') && EMAIL.test(value)) return 'contact'
  if (PHONE.test(value) && digitsIn(value) >= 9 && /[\s()/+-]/.test(value)) return 'contact'
  if (DATE.test(value)) return 'dateOfBirth'
  if (RECORD_NUMBER.test(value)) return 'recordNumber'
  if (TITLED.test(value) || COMMA_NAME.test(value)) return 'name'
  if (value.length > 40 || value.split(/\s+/).length > 5) return 'freeText'
  return null
}

/**
 * Why a column is pointed out, or null.
 * @param values the cells of the first rows, blank ones left out
 */
export function suspicionOfColumn(heading: string, values: readonly string[]): Suspicion | null {
  const plain = heading
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/[^\p{L}\d]+/gu, ' ')
    .trim()
  const byHeading = HEADINGS.find(([, pattern]) => pattern.test(plain))?.[0]
  if (byHeading && !(byHeading === 'name' && NAMES_OF_THINGS.test(plain))) return byHeading
  return suspicionOfValues(values)
}

function suspicionOfValues(values: readonly string[]): Suspicion | null {
  if (values.length === 0) return null
  const counts = new Map<Suspicion, number>()
  for (const value of values) {
    const suspicion = suspicionOfValue(value)
    if (suspicion) counts.set(suspicion, (counts.get(suspicion) ?? 0) + 1)
  }
  const share = (suspicion: Suspicion) => (counts.get(suspicion) ?? 0) / values.length
  if (share('contact') > 0) return 'contact'
  if (share('dateOfBirth') >= 0.3) return 'dateOfBirth'
  if (share('recordNumber') >= 0.5) return 'recordNumber'
  if (share('name') >= 0.1 || manyDifferentNames(values)) return 'name'
  return share('freeText') >= 0.1 ? 'freeText' : null
}

/** Two capitalised words a cell, hardly ever the same: people. A few that come again: wards. */
function manyDifferentNames(values: readonly string[]): boolean {
  const alike = values.filter((value) => TWO_NAMES.test(value))
  return alike.length >= values.length / 2 && new Set(alike).size > alike.length / 2
}

const digitsIn = (text: string) => text.replace(/\D/g, '').length
