import { z } from 'zod'
import { IMPORT_STATES, ROW_FATES } from '#shared/terms/importState.ts'
import { OUTCOMES } from '#shared/terms/outcome.ts'
import { AGE_BANDS, SEXES } from '#shared/terms/subject.ts'
import { id, instant, page, pageOf, reasonForChange } from './common.ts'

/** How the file is written; said by the person, never guessed from the numbers. */
export const importFormat = z.object({
  delimiter: z.enum([',', ';', '\t']),
  decimal: z.enum(['.', ',']),
})
export type ImportFormat = z.infer<typeof importFormat>

/** Why a column looks as if it could identify somebody. */
export const SUSPICIONS = ['name', 'dateOfBirth', 'recordNumber', 'contact', 'freeText'] as const

/** A column of the file: its heading, a few different values, what it looks like. */
export const importColumn = z.object({
  name: z.string(),
  samples: z.array(z.string()),
  suspicion: z.enum(SUSPICIONS).nullable(),
})
export type ImportColumn = z.infer<typeof importColumn>

const analyteKey = z.string().min(1, 'Please choose the analyte.').max(40)
const codeWords = z.array(z.string().max(60)).max(20)

/** What a column means. A suspicious column is left out unless `declared` says what it is. */
export const columnMeaning = z.discriminatedUnion('as', [
  z.object({ as: z.literal('leaveOut') }),
  z.object({ as: z.literal('subject') }),
  z.object({ as: z.literal('site') }),
  z.object({ as: z.literal('sessionNumber') }),
  z.object({ as: z.literal('sex') }),
  z.object({ as: z.literal('ageYears') }),
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

export const importMapping = z.object({
  format: importFormat,
  columns: z.array(
    z.object({
      name: z.string(),
      meaning: columnMeaning,
      declared: z.string().trim().max(200).optional(),
    }),
  ),
  /** Site of every row where no column names one. */
  siteId: id.nullable(),
  /** Site by the word that stands in the site column. */
  sitesByWord: z.record(z.string(), id),
})
export type ImportMapping = z.infer<typeof importMapping>

/** A row, read and understood, as it would be entered. */
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

/** What is wrong with a row: in which column, and why. */
export const importProblem = z.object({ column: z.string(), reason: z.string() })
export type ImportProblem = z.infer<typeof importProblem>

export const importCounts = z.object({
  rows: z.number().int(),
  new: z.number().int(),
  same: z.number().int(),
  refused: z.number().int(),
  subjects: z.number().int(),
  /** How many of the new rows lie in each outcome. */
  outcomes: z.record(z.string(), z.number().int()),
})
export type ImportCounts = z.infer<typeof importCounts>

export const dataImport = z.object({
  id,
  number: z.number().int(),
  state: z.enum(IMPORT_STATES),
  fileHash: z.string(),
  fileBytes: z.number().int(),
  format: importFormat.nullable(),
  columns: z.array(importColumn),
  mapping: importMapping.nullable(),
  counts: importCounts.nullable(),
  jobId: id.nullable(),
  uploadedByName: z.string(),
  createdAt: instant,
  enteredAt: instant.nullable(),
  version: z.number().int(),
})
export type DataImport = z.infer<typeof dataImport>

/** What a list of imports shows: no values, no headings. */
export const importSummary = dataImport.pick({
  id: true,
  number: true,
  state: true,
  fileHash: true,
  fileBytes: true,
  counts: true,
  uploadedByName: true,
  createdAt: true,
  enteredAt: true,
})

export const importPreviewRequest = z.object({ mapping: importMapping, version: z.number().int() })

/** Enter all good rows, or all but the lines named here; refused rows never enter. */
export const importEnterRequest = z.object({
  leaveOutLines: z.array(z.number().int().positive()).max(100_000),
  reasonForChange,
  version: z.number().int(),
})

export const importRow = z.object({
  line: z.number().int(),
  fate: z.enum(ROW_FATES),
  entry: importEntry.nullable(),
  problems: z.array(importProblem),
  subjectCode: z.string().nullable(),
})
export type ImportRow = z.infer<typeof importRow>
export const importRowQuery = page.extend({ fate: z.enum(ROW_FATES).optional() })
export const importRowPage = pageOf(importRow)
