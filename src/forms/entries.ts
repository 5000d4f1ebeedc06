import { readNumber } from './readNumber.ts'

/** A box for one number on a page that saves nothing: what it is called and which numbers it takes. */
export type Entry = {
  label: string
  unit?: string
  hint?: string
  /** What stands in the box at first. */
  start: string
  /** May be left blank. */
  optional?: boolean
  /** A sentence for a number that cannot be used, or null. */
  refuse?: (value: number) => string | null
}

export type Entries = Readonly<Record<string, Entry>>

/** The numbers of a set of entries; those that may be left blank may be missing. */
export type EntryValues<E extends Entries = Entries> = {
  readonly [K in keyof E]: E[K] extends { optional: true } ? number | undefined : number
}

/** What is wrong, by the name of the entry. */
export type EntryProblems = Readonly<Record<string, string>>

export type EntryReading<E extends Entries> =
  | { values: EntryValues<E>; problems: null }
  | { values: null; problems: EntryProblems }

/** All numbers, or what is wrong at each box; blank is no value, never 0. */
export function readEntries<E extends Entries>(
  entries: E,
  texts: Readonly<Record<string, string>>,
): EntryReading<E> {
  const problems: Record<string, string> = {}
  const values: Record<string, number | undefined> = {}
  for (const [name, entry] of Object.entries(entries)) {
    const { value, problem } = readNumber(texts[name] ?? entry.start)
    const wrong = problem ?? problemOf(entry, value)
    if (wrong === null) values[name] = value
    else problems[name] = wrong
  }
  return Object.keys(problems).length > 0
    ? { values: null, problems }
    : { values: values as EntryValues<E>, problems: null }
}

function problemOf({ optional, start, refuse }: Entry, value: number | undefined): string | null {
  if (value !== undefined) return refuse?.(value) ?? null
  if (optional) return null
  return start === '' ? 'Give a number.' : `Give a number, such as ${start}.`
}
