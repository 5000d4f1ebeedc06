import { z } from 'zod'
import { IMPORT_STATES, ROW_FATES } from '#shared/terms/importState.ts'
import { OUTCOMES } from '#shared/terms/outcome.ts'
import { AGE_BANDS, SEXES } from '#shared/terms/subject.ts'
import { id, instant, page, pageOf, reasonForChange, words } from './common.ts'

export const DELIMITERS = [',', ';', '\t'] as const
export const delimiter = z.enum(DELIMITERS, { error: 'Please say what stands between the cells.' })
export type Delimiter = z.infer<typeof delimiter>

/** How the file is written; said by the person, never guessed from the numbers. */
export const importFormat = z.object({
  delimiter,
  decimal: z.enum(['.', ','], { error: 'Please say how decimals are written.' }),
})
export type ImportFormat = z.infer<typeof importFormat>

/** Why a column looks as if it could identify somebody. */
export const SUSPICIONS = ['name', 'dateOfBirth', 'recordNumber', 'contact', 'freeText'] as const
export type Suspicion = (typeof SUSPICIONS)[number]

/** A column of the file: its heading, and what it looks like. */
export const importColumn = z.object({ name: z.string(), suspicion: z.enum(SUSPICIONS).nullable() })
export type ImportColumn = z.infer<typeof importColumn>

const analyteKey = z
  .string({ error: 'Please choose the analyte.' })
  .min(1, 'Please choose the analyte.')
  .max(40)
const codeWords = z.array(words(60)).max(20, 'At most 20 words.')

/** Ages at which a file may stop counting: its "80" then stands for "80 and over". */
export const OPEN_AGES = [80, 85] as const

/** What a column means. A suspicious column is left out unless `declared` says what it is. */
export const columnMeaning = z.discriminatedUnion('as', [
  z.object({ as: z.literal('leaveOut') }),
  z.object({ as: z.literal('subject') }),
  z.object({ as: z.literal('site') }),
  z.object({ as: z.literal('sessionNumber') }),
  z.object({
    as: z.literal('sex'),
    F: codeWords,
    M: codeWords,
    other: codeWords,
    unknown: codeWords,
  }),
  z.object({ as: z.literal('ageYears'), andOver: z.literal(OPEN_AGES).nullable() }),
  z.object({ as: z.literal('ageBand') }),
  z.object({ as: z.literal('sensorValue'), analyteKey }),
  z.object({ as: z.literal('belowLod'), analyteKey }),
  z.object({ as: z.literal('referenceValue'), analyteKey }),
  z.object({
    as: z.literal('outcome'),
    present: codeWords,
    absent: codeWords,
    indeterminate: codeWords,
  }),
  z.object({
    as: z.literal('covariate'),
    key: z.string().regex(/^[a-z][a-z0-9_]{0,39}$/, 'Small letters, digits and _, a letter first.'),
  }),
])
export type ColumnMeaning = z.infer<typeof columnMeaning>
export type Meaning = ColumnMeaning['as']
export type MeaningOf<As extends Meaning> = Extract<ColumnMeaning, { as: As }>

export const mappedColumn = z.object({
  name: z.string(),
  meaning: columnMeaning,
  declared: z.string().trim().max(200, 'At most 200 characters.').optional(),
})
export type MappedColumn = z.infer<typeof mappedColumn>

export const importMapping = z.object({
  format: importFormat,
  columns: z.array(mappedColumn).max(300, 'At most 300 columns.'),
  /** Site of every row where no column names one. */
  siteId: id.nullable(),
  /** Site by the word that stands in the site column. */
  sitesByWord: z.record(z.string().max(120), id),
})
export type ImportMapping = z.infer<typeof importMapping>

/** A column as its first rows show it. Samples of a suspicious column stay in the file. */
export const foundColumn = importColumn.extend({
  samples: z.array(z.string()),
  /** All different values, where there are few; null where there are many or they are withheld. */
  words: z.array(z.string()).nullable(),
  blanks: z.number().int(),
  suggestion: columnMeaning,
})
export type FoundColumn = z.infer<typeof foundColumn>

/** The first rows of the file under one delimiter, with what its columns probably mean. */
export const importReading = z.object({
  delimiter,
  rowsRead: z.number().int(),
  wholeFile: z.boolean(),
  columns: z.array(foundColumn),
  siteId: id.nullable(),
  sitesByWord: z.record(z.string(), id),
})
export type ImportReading = z.infer<typeof importReading>
export const importReadingQuery = z.object({ delimiter: delimiter.optional() })

/** A row, read and understood, as it would be entered. Null and missing keys are missing values. */
export const importEntry = z.object({
  subjectWord: z.string(),
  siteId: id,
  sessionNumber: z.number().int(),
  sex: z.enum(SEXES).nullable(),
  ageBand: z.enum(AGE_BANDS).nullable(),
  sensorValues: z.record(z.string(), z.object({ value: z.number(), belowLod: z.boolean() })),
  referenceValues: z.record(z.string(), z.number()),
  outcome: z.enum(OUTCOMES).nullable(),
  covariates: z.record(z.string(), z.union([z.string(), z.number()])),
})
export type ImportEntry = z.infer<typeof importEntry>

/** What is wrong with a row: in which column, and why. Never what stood in the cell. */
export const importProblem = z.object({ column: z.string(), reason: z.string() })
export type ImportProblem = z.infer<typeof importProblem>

export const importCounts = z.object({
  rows: z.number().int(),
  new: z.number().int(),
  same: z.number().int(),
  refused: z.number().int(),
  /** Different subjects among the new rows, and those of them with more than one row. */
  subjects: z.number().int(),
  severalSessions: z.number().int(),
  /** Those subjects by outcome, where a column holds one. */
  outcomes: z.record(z.string(), z.number().int()).nullable(),
  /** New rows whose cell is blank, by column: missing values, kept as missing. */
  blanks: z.array(z.object({ column: z.string(), rows: z.number().int() })),
  /** Refused rows by column and reason, most frequent first. */
  problems: z.array(importProblem.extend({ rows: z.number().int() })),
  entered: z.object({ rows: z.number().int(), subjects: z.number().int() }).nullable(),
})
export type ImportCounts = z.infer<typeof importCounts>

const importReference = z.object({ id, number: z.number().int(), state: z.enum(IMPORT_STATES) })

export const dataImport = z.object({
  id,
  number: z.number().int(),
  state: z.enum(IMPORT_STATES),
  /** Why the last piece of work ended without its result. */
  failure: z.string().nullable(),
  /** It ended because the person who asked for it stopped it. */
  stopped: z.boolean(),
  fileHash: z.string(),
  fileBytes: z.number().int(),
  columns: z.array(importColumn),
  mapping: importMapping.nullable(),
  counts: importCounts.nullable(),
  /** Work under way; only the person who started it may stop it. */
  work: z
    .object({
      jobId: id,
      done: z.number().int(),
      total: z.number().int(),
      words: z.string().nullable(),
      own: z.boolean(),
      stopping: z.boolean(),
    })
    .nullable(),
  uploadedByName: z.string(),
  createdAt: instant,
  enteredAt: instant.nullable(),
  /** An earlier import of the very same bytes. */
  sameFile: importReference.nullable(),
  version: z.number().int(),
})
export type DataImport = z.infer<typeof dataImport>

/** What a list of imports shows: no values, no headings, no outcomes. */
export const importSummary = dataImport
  .pick({
    id: true,
    number: true,
    state: true,
    fileHash: true,
    fileBytes: true,
    uploadedByName: true,
    createdAt: true,
    enteredAt: true,
  })
  .extend({
    counts: importCounts
      .pick({ rows: true, new: true, same: true, refused: true, subjects: true, entered: true })
      .nullable(),
  })
export type ImportSummary = z.infer<typeof importSummary>

export const importPreviewRequest = z.object({ mapping: importMapping, version: z.number().int() })
export type ImportPreviewRequest = z.infer<typeof importPreviewRequest>

/** Enter all good rows, or all but the lines named here; refused rows never enter. */
export const importEnterRequest = z.object({
  leaveOutLines: z.array(z.number().int().positive()).max(25_000),
  reasonForChange,
  version: z.number().int(),
})
export type ImportEnterRequest = z.infer<typeof importEnterRequest>

export const importDiscardRequest = z.object({ reasonForChange, version: z.number().int() })
export type ImportDiscardRequest = z.infer<typeof importDiscardRequest>

export const importRow = z.object({
  /** Line in the file, the headings being line 1. */
  line: z.number().int(),
  fate: z.enum(ROW_FATES),
  entry: importEntry.nullable(),
  /** With what stood in the cell, as long as the import is not entered. */
  problems: z.array(importProblem.extend({ found: z.string().nullable() })),
  subjectCode: z.string().nullable(),
})
export type ImportRow = z.infer<typeof importRow>
export const importRowQuery = page.extend({ fate: z.enum(ROW_FATES).optional() })
export type ImportRowQuery = z.infer<typeof importRowQuery>
export const importRowPage = pageOf(importRow)
