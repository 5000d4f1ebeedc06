import { formatConcentration } from '#shared/terms/numbers.ts'
import {
  type Entries,
  type Entry,
  type EntryProblems,
  type EntryValues,
  readEntries,
} from '../../forms/entries.ts'

export type Converted = { term: string; value: string }

type Definition<E extends Entries> = {
  key: string
  label: string
  /** Equation and source. */
  note: string
  entries: E
  /** Numbers that do not go together: what is wrong, at the box to change. */
  refuse?: (values: EntryValues<E>) => Partial<Record<keyof E & string, string>>
  work: (
    values: EntryValues<E>,
  ) => readonly (readonly [term: string, value: number, unit: string])[]
}

/** Turns typed numbers into others by one equation. */
export type Conversion = {
  key: string
  label: string
  note: string
  entries: Entries
  convert: (
    texts: Readonly<Record<string, string>>,
  ) => { results: Converted[]; problems: null } | { results: null; problems: EntryProblems }
}

/** A conversion whose work may rely on the types of its entries. */
export function conversion<E extends Entries>(definition: Definition<E>): Conversion {
  const { key, label, note, entries, refuse, work } = definition
  return {
    key,
    label,
    note,
    entries,
    convert: (texts) => {
      const reading = readEntries(entries, texts)
      if (reading.problems !== null) return { results: null, problems: reading.problems }
      const { values } = reading
      const refused = refuse?.(values) ?? {}
      if (Object.keys(refused).length > 0)
        return { results: null, problems: refused as EntryProblems }
      return { results: work(values).map(asWords), problems: null }
    },
  }
}

const asWords = ([term, value, unit]: readonly [string, number, string]): Converted => ({
  term,
  value: unit ? `${shown(value)} ${unit}` : shown(value),
})

/** Six digits, as tables of such figures give them; very small numbers in powers of ten. */
const shown = (value: number): string =>
  value !== 0 && Math.abs(value) < 1e-4
    ? value.toExponential(5).replace('-', '−').replace('e−', ' × 10^−')
    : formatConcentration(value, 6)

type Words = Pick<Entry, 'label' | 'start'> & Partial<Pick<Entry, 'unit' | 'hint'>>
type Needed = Entry & { optional?: false }

export const plainEntry = (words: Words): Needed => ({ ...words, optional: false })

export const aboveZero = (words: Words): Needed => ({
  ...words,
  optional: false,
  refuse: (value) => (value > 0 ? null : 'Above 0.'),
})

export const TEMPERATURE: Needed = {
  label: 'Temperature',
  unit: '°C',
  start: '25',
  optional: false,
  refuse: (value) => (value > -80 && value < 100 ? null : 'Between −80 and 100 °C.'),
}

export const PRESSURE = aboveZero({ label: 'Pressure', unit: 'kPa', start: '101.325' })

export const MOLAR_MASS = aboveZero({
  label: 'Molar mass',
  unit: 'g/mol',
  start: '17.031',
  hint: 'Ammonia 17.031, acetone 58.08, isoprene 68.119',
})
