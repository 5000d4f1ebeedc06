import type {
  ImportEntry,
  ImportFormat,
  ImportProblem,
  MappedColumn,
  Meaning,
  MeaningOf,
} from '#shared/schemas/import.ts'
import { plainWord } from '#shared/terms/codeWords.ts'
import { SUSPICION_WORDS } from '#shared/terms/importColumn.ts'
import { bandOfAge, readAgeBand, readNumber, readYesNo } from './cells.ts'
import {
  MOST_COVARIATE_CHARACTERS,
  MOST_SESSION_NUMBER,
  MOST_SUBJECT_CHARACTERS,
} from './importLimits.ts'
import { suspicionOfValue } from './suspicion.ts'

export type FoundProblem = ImportProblem & { found: string | null }

/** A row as far as it could be read; the session number is null where no column holds one. */
export type ReadRow = {
  line: number
  entry: Omit<ImportEntry, 'sessionNumber'> & { sessionNumber: number | null }
  problems: FoundProblem[]
  /** Headings of the columns with a meaning whose cell is blank. */
  blanks: string[]
}

export type Flag = { column: string; flag: boolean | null }

/** A row while its cells are read. */
export type Reading = ReadRow & {
  flags: Map<string, Flag>
  format: ImportFormat
  /** Analytes that cannot be below 0. */
  gasKeys: ReadonlySet<string>
  sites: ReadonlyMap<string, string>
  /** The sides of the coded columns by heading and word. */
  codes: ReadonlyMap<string, ReadonlyMap<string, string>>
}

type Cell<As extends Meaning> = {
  row: Reading
  column: MappedColumn
  meaning: MeaningOf<As>
  cell: string
  refuse: (reason: string) => void
}

/** Takes a cell into the row's entry, or says what is wrong with it. A blank one is a missing value. */
export function readCell(row: Reading, column: MappedColumn, cell: string): void {
  const { name, meaning } = column
  if (meaning.as === 'leaveOut') return
  const refuse = (reason: string) => {
    row.problems.push({ column: name, reason, found: cell === '' ? null : cell.slice(0, 60) })
  }
  if (cell === '') readBlank(row, column, refuse)
  else (READERS[meaning.as] as (at: Cell<Meaning>) => void)({ row, column, meaning, cell, refuse })
}

const NEEDED: Partial<Record<Meaning, string>> = {
  subject: 'Without a subject the row belongs to nobody.',
  site: 'Without a site the row belongs nowhere.',
  sessionNumber: 'The session number is missing.',
}

function readBlank(row: Reading, { name, meaning }: MappedColumn, refuse: Cell<Meaning>['refuse']) {
  const needed = NEEDED[meaning.as]
  if (needed) refuse(needed)
  else if (meaning.as === 'belowLod')
    row.flags.set(meaning.analyteKey, { column: name, flag: null })
  else row.blanks.push(name)
}

const READERS: { [As in Exclude<Meaning, 'leaveOut'>]: (at: Cell<As>) => void } = {
  subject: ({ row, cell, refuse }) => {
    if (cell.length > MOST_SUBJECT_CHARACTERS) refuse('Too long to be a subject.')
    row.entry.subjectWord = cell
  },
  site: ({ row, cell, refuse }) => {
    const siteId = row.sites.get(plainWord(cell))
    if (siteId) row.entry.siteId = siteId
    else refuse('This word stands for no site.')
  },
  sessionNumber: ({ row, cell, refuse }) => {
    const number = readNumber(cell, row.format.decimal)
    if (number !== null && Number.isInteger(number) && number >= 1 && number <= MOST_SESSION_NUMBER)
      row.entry.sessionNumber = number
    else refuse(`Not a whole number from 1 to ${MOST_SESSION_NUMBER.toLocaleString('en-GB')}.`)
  },
  sex: ({ row, column, cell, refuse }) => {
    const sex = row.codes.get(column.name)?.get(plainWord(cell))
    if (sex) row.entry.sex = sex as ImportEntry['sex']
    else refuse('This word stands for no sex.')
  },
  outcome: ({ row, column, cell, refuse }) => {
    const outcome = row.codes.get(column.name)?.get(plainWord(cell))
    if (outcome) row.entry.outcome = outcome as ImportEntry['outcome']
    else refuse('This word stands for no outcome.')
  },
  ageYears: readAge,
  ageBand: ({ row, cell, refuse }) => {
    row.entry.ageBand = readAgeBand(cell)
    if (row.entry.ageBand === null) refuse('Not a five-year band such as 50-54 or 90+.')
  },
  sensorValue: (at) => {
    const value = readValue(at)
    if (value !== null)
      at.row.entry.sensorValues[at.meaning.analyteKey] = { value, belowLod: false }
  },
  referenceValue: (at) => {
    const value = readValue(at)
    if (value !== null) at.row.entry.referenceValues[at.meaning.analyteKey] = value
  },
  belowLod: ({ row, column, meaning, cell, refuse }) => {
    const flag = readYesNo(cell)
    if (flag === null) refuse('Says neither yes nor no (1/0, yes/no, true/false).')
    else row.flags.set(meaning.analyteKey, { column: column.name, flag })
  },
  covariate: readCovariate,
}

function readAge({ row, meaning: { andOver }, cell, refuse }: Cell<'ageYears'>): void {
  const years = readNumber(cell, row.format.decimal)
  if (years === null) refuse('Not a number.')
  else if (years < 0 || years > 130) refuse('Not an age from 0 to 130 years.')
  else {
    row.entry.ageBand = bandOfAge(years, andOver)
    if (row.entry.ageBand === null)
      refuse(`Above ${andOver}, although ${andOver} is said to stand for all older ages.`)
  }
}

function readValue(at: Cell<'sensorValue'> | Cell<'referenceValue'>): number | null {
  const { row, meaning, cell, refuse } = at
  const value = readNumber(cell, row.format.decimal)
  if (value === null) {
    refuse(
      /^[<>≤≥]/.test(cell)
        ? 'Not a number. A value below the limit of detection needs a number and a column that flags it.'
        : 'Not a number.',
    )
  } else if (value < 0 && row.gasKeys.has(meaning.analyteKey)) {
    refuse('A concentration cannot be below 0.')
    return null
  }
  return value
}

function readCovariate({ row, column, meaning, cell, refuse }: Cell<'covariate'>): void {
  const suspicion = column.declared ? null : suspicionOfValue(cell)
  const number = readNumber(cell, row.format.decimal)
  if (suspicion)
    refuse(
      `This looks like ${SUSPICION_WORDS[suspicion]}. Leave the column out, or say what it holds.`,
    )
  else if (number !== null) row.entry.covariates[meaning.key] = number
  else if (cell.length > MOST_COVARIATE_CHARACTERS)
    refuse(
      `Longer than ${MOST_COVARIATE_CHARACTERS} characters: a covariate is a number or a code.`,
    )
  else if (/\p{Cc}/u.test(cell)) refuse('Holds characters that cannot be stored.')
  else row.entry.covariates[meaning.key] = cell
}
