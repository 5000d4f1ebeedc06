import { z } from 'zod'
import { LEFT_OUT_REASONS, SESSION_RULES } from '#shared/terms/analysis.ts'
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

/** A dataset in a list: enough to choose it by. */
export const datasetSummary = z.object({
  id,
  lockKind: z.enum(LOCK_KINDS),
  lockNumber: z.number().int(),
  frozenAt: instant,
  hash: z.string(),
  subjectCount: z.number().int(),
  rowCount: z.number().int(),
})
export type DatasetSummary = z.infer<typeof datasetSummary>

export const dataset = datasetSummary.extend({
  manifest: datasetManifest,
  /** The protocol version that stood when the data were frozen. */
  protocol: protocolDocument,
  caution,
})
export type Dataset = z.infer<typeof dataset>

const count = z.number().int().nonnegative()
const leftOut = z.array(z.object({ reason: z.enum(LEFT_OUT_REASONS), subjects: count }))

/** Who is counted in an accuracy analysis, and who is not and why; every subject once. */
export const accuracyCounts = z.object({
  subjects: count,
  present: count,
  absent: count,
  /** Sensor values that went in; more than subjects where every session counts. */
  values: count,
  /** Counted subjects with more than one valid value. */
  severalSessions: count,
  /** Values below the limit of detection that went in as they were given. */
  belowLod: count,
  leftOut,
})
export type AccuracyCounts = z.infer<typeof accuracyCounts>

/** The numbers of one analyte by outcome, for moving a cut-off in the browser. */
export const datasetValues = z.object({
  analyteKey: z.string(),
  unit: z.string(),
  sessionRule: z.enum(SESSION_RULES),
  present: z.array(z.number()),
  absent: z.array(z.number()),
  /** Which subject each value came from, where some subject has several in it; else null. */
  presentSubjects: z.array(z.number().int()).nullable(),
  absentSubjects: z.array(z.number().int()).nullable(),
  counts: accuracyCounts,
  caution,
})
export type DatasetValues = z.infer<typeof datasetValues>

export const datasetValuesQuery = z.object({
  analyteKey: z.string({ error: 'Please choose an analyte.' }).max(40),
  sessionRule: z.enum(SESSION_RULES).default('every'),
})

export const datasetPairsQuery = datasetValuesQuery.extend({
  /** Analyte of the reference values, the sensor's unless given. */
  referenceKey: z.string().max(40).optional(),
})

/** Who is counted in an agreement analysis, and who is not and why; every subject once. */
export const agreementCounts = z.object({
  subjects: count,
  counted: count,
  pairs: count,
  /** Counted subjects with more than one session that holds both values. */
  severalSessions: count,
  belowLod: count,
  leftOut,
})
export type AgreementCounts = z.infer<typeof agreementCounts>

/** Sensor and reference analyser value of one analyte, pair by pair. */
export const datasetPairs = z.object({
  analyteKey: z.string(),
  unit: z.string(),
  sessionRule: z.enum(SESSION_RULES),
  sensor: z.array(z.number()),
  reference: z.array(z.number()),
  /** Analyte and unit of the reference values. */
  referenceKey: z.string(),
  referenceUnit: z.string(),
  /** Code and key of the subject of each pair. */
  subjects: z.array(z.string()),
  subjectIds: z.array(id),
  counts: agreementCounts,
  caution,
})
export type DatasetPairs = z.infer<typeof datasetPairs>

/** What subjects can be divided by: the groups that are there, each with how many subjects. */
export const datasetGroups = z.array(
  z.object({
    by: z.discriminatedUnion('kind', [
      z.object({ kind: z.literal('site') }),
      z.object({ kind: z.literal('sex') }),
      z.object({ kind: z.literal('covariate'), name: z.string() }),
    ]),
    groups: z.array(z.object({ group: z.string(), subjects: count })),
  }),
)
export type DatasetGroups = z.infer<typeof datasetGroups>
