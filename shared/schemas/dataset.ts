import { z } from 'zod'
import { LOCK_KINDS } from '#shared/terms/lockState.ts'
import { OUTCOMES } from '#shared/terms/outcome.ts'
import { AGE_BANDS, SEXES } from '#shared/terms/subject.ts'
import { caution, id, instant } from './common.ts'
import { protocolDocument } from './protocol.ts'

/** One frozen breath session; `session` is null for a subject without any. */
export const datasetRow = z.object({
  subject: z.string(),
  subjectId: id,
  site: z.string(),
  sex: z.enum(SEXES).nullable(),
  ageBand: z.enum(AGE_BANDS).nullable(),
  covariates: z.record(z.string(), z.union([z.string(), z.number()])),
  session: z.number().int().nullable(),
  sensorValues: z.record(z.string(), z.object({ value: z.number(), belowLod: z.boolean() })),
  referenceValues: z.record(z.string(), z.number()),
  outcome: z.enum(OUTCOMES).nullable(),
})
export type DatasetRow = z.infer<typeof datasetRow>

/** What was frozen, when, under which protocol, and the hashes that prove it. */
export const datasetManifest = z.object({
  study: z.string(),
  lockKind: z.enum(LOCK_KINDS),
  frozenAt: instant,
  protocolVersion: z.number().int(),
  protocolHash: z.string(),
  analytes: z.array(z.object({ key: z.string(), name: z.string(), unit: z.string() })),
  subjectCount: z.number().int(),
  rowCount: z.number().int(),
  /** SHA-256 over the row hashes, in order, each as 64 hexadecimal digits and a line feed. */
  rowsHash: z.string(),
  /** Each frozen table: how many records, and SHA-256 over their canonical forms in order of key. */
  tables: z.array(z.object({ name: z.string(), records: z.number().int(), hash: z.string() })),
  auditCount: z.number().int(),
  auditHeadHash: z.string(),
})
export type DatasetManifest = z.infer<typeof datasetManifest>

export const dataset = z.object({
  id,
  frozenAt: instant,
  hash: z.string(),
  subjectCount: z.number().int(),
  rowCount: z.number().int(),
  manifest: datasetManifest,
  protocol: protocolDocument,
  caution,
})
export type Dataset = z.infer<typeof dataset>

/** The numbers of one analyte by outcome, for moving a cut-off in the browser. */
export const datasetValues = z.object({
  analyteKey: z.string(),
  unit: z.string(),
  present: z.array(z.number()),
  absent: z.array(z.number()),
  caution,
})
export type DatasetValues = z.infer<typeof datasetValues>
