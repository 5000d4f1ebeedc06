import { z } from 'zod'
import { ANALYSIS_BADGES, ANALYSIS_KINDS } from '#shared/terms/analysis.ts'
import { DIRECTIONS } from '#shared/terms/protocol.ts'
import { caution, id, instant, words } from './common.ts'

/** Several sessions of a subject: all of them as one cluster, or one value by a rule. */
export const SESSION_RULES = ['every', 'first', 'mean', 'median'] as const

const probability = z
  .number({ error: 'Please give a number.' })
  .gt(0, 'Must lie between 0 and 1.')
  .lt(1, 'Must lie between 0 and 1.')

export const accuracyParameters = z.object({
  kind: z.literal('accuracy'),
  analyteKey: z.string(),
  direction: z.enum(DIRECTIONS),
  sessionRule: z.enum(SESSION_RULES),
  /** In the analyte's unit; null stores no table at a cut-off. */
  cutOff: z.number().finite().nullable(),
  confidence: probability,
  /** Predictive values are also given at this prevalence. */
  prevalence: probability.nullable(),
})
export type AccuracyParameters = z.infer<typeof accuracyParameters>

export const agreementParameters = z.object({
  kind: z.literal('agreement'),
  analyteKey: z.string(),
  sessionRule: z.enum(SESSION_RULES),
  confidence: probability,
  acceptance: z.object({ lower: z.number().finite(), upper: z.number().finite() }).nullable(),
})
export type AgreementParameters = z.infer<typeof agreementParameters>

export const analysisParameters = z.discriminatedUnion('kind', [
  accuracyParameters,
  agreementParameters,
])
export type AnalysisParameters = z.infer<typeof analysisParameters>

export const analysisRequest = z.object({
  id,
  datasetId: id,
  title: words(200),
  parameters: analysisParameters,
})
export type AnalysisRequest = z.infer<typeof analysisRequest>

export const analysisSummary = z.object({
  id,
  number: z.number().int(),
  kind: z.enum(ANALYSIS_KINDS),
  badge: z.enum(ANALYSIS_BADGES),
  title: z.string(),
  runAt: instant,
  runByName: z.string(),
  datasetHash: z.string(),
  caution,
})
export type AnalysisSummary = z.infer<typeof analysisSummary>
