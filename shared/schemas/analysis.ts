import { z } from 'zod'
import {
  ANALYSIS_BADGES,
  ANALYSIS_KINDS,
  CUT_OFF_RULES,
  MEASURES,
  SESSION_RULES,
} from '#shared/terms/analysis.ts'
import { JOB_STATES } from '#shared/terms/job.ts'
import { LOCK_KINDS } from '#shared/terms/lockState.ts'
import { DIRECTIONS } from '#shared/terms/protocol.ts'
import { accuracyMore, accuracyOptions } from './accuracyMore.ts'
import {
  agreementParameters,
  agreementResult,
  correlationParameters,
  correlationResult,
} from './agreement.ts'
import { caution, id, instant, words } from './common.ts'
import { comparisonParameters, comparisonResult } from './comparison.ts'
import { accuracyCounts } from './dataset.ts'
import { areaEstimate, bound, count, estimate, storedCurve } from './estimate.ts'
import { panelParameters, panelResult } from './panel.ts'
import { precisionParameters, precisionResult } from './precision.ts'

const number = z.number({ error: 'Please give a number.' }).finite('Please give a number.')
const probability = number.gt(0, 'Must lie between 0 and 1.').lt(1, 'Must lie between 0 and 1.')

export const accuracyParameters = accuracyOptions.extend({
  kind: z.literal('accuracy'),
  analyteKey: z.string(),
  direction: z.enum(DIRECTIONS),
  sessionRule: z.enum(SESSION_RULES),
  /** In the analyte's unit; null stores no table at a cut-off. */
  cutOff: number.nullable(),
  confidence: probability,
  /** Predictive values are also given at this prevalence. */
  prevalence: probability.nullable(),
})
export type AccuracyParameters = z.infer<typeof accuracyParameters>

export const analysisParameters = z.discriminatedUnion('kind', [
  accuracyParameters,
  agreementParameters,
  comparisonParameters,
  panelParameters,
  precisionParameters,
  correlationParameters,
])
export type AnalysisParameters = z.infer<typeof analysisParameters>

export const analysisRequest = z.object({
  id,
  datasetId: id,
  title: words(200),
  parameters: analysisParameters,
})
export type AnalysisRequest = z.infer<typeof analysisRequest>

/** One line of the table at a cut-off; n and N where it is a proportion. */
export const measureRow = estimate.extend({
  measure: z.enum(MEASURES),
  numerator: count.nullable(),
  denominator: count.nullable(),
})
export type MeasureRow = z.infer<typeof measureRow>

export const accuracyAtCutOffResult = z.object({
  cutOff: z.number(),
  table: z.object({
    truePositives: count,
    falsePositives: count,
    falseNegatives: count,
    trueNegatives: count,
  }),
  measures: z.array(measureRow),
  /** Why predictive values as observed are not among the measures; null where they are. */
  observedPredictiveValuesHidden: z.string().nullable(),
  /** What has to be known about the intervals of this table, as a sentence; mostly null. */
  caveat: z.string().nullable(),
})
export type AccuracyAtCutOffResult = z.infer<typeof accuracyAtCutOffResult>

export const ruleCutOffs = z.object({
  rule: z.enum(CUT_OFF_RULES),
  /** All that tie, the one to prefer first; a threshold of null calls nobody positive. */
  cutOffs: z.array(
    z.object({
      threshold: z.number().nullable(),
      sensitivity: z.number(),
      specificity: z.number(),
    }),
  ),
})
export type RuleCutOffs = z.infer<typeof ruleCutOffs>

/** What does not hang on the cut-off: the curve, its area, the rules. */
export const accuracyOverall = z.object({
  /** Null with fewer than 10 subjects in a class; `areaWithheld` says so. */
  area: areaEstimate.nullable(),
  areaWithheld: z.string().nullable(),
  curve: storedCurve,
  /** Chosen from the data, so exploratory; empty where the area is withheld. */
  rules: z.array(ruleCutOffs),
})
export type AccuracyOverall = z.infer<typeof accuracyOverall>

const measured = { analyteName: z.string(), unit: z.string() }

export const accuracyResult = accuracyOverall.extend({
  ...accuracyMore.shape,
  kind: z.literal('accuracy'),
  ...measured,
  counts: accuracyCounts,
  /** As the protocol plans it for this analyte and direction. */
  plannedCutOff: z.number().nullable(),
  atCutOff: accuracyAtCutOffResult.nullable(),
})
export type AccuracyResult = z.infer<typeof accuracyResult>

export const analysisResult = z.discriminatedUnion('kind', [
  accuracyResult,
  agreementResult,
  comparisonResult,
  panelResult,
  precisionResult,
  correlationResult,
])
export type AnalysisResult = z.infer<typeof analysisResult>

export const analysisSummary = z.object({
  id,
  number: z.number().int(),
  kind: z.enum(ANALYSIS_KINDS),
  badge: z.enum(ANALYSIS_BADGES),
  title: z.string(),
  runAt: instant,
  runByName: z.string(),
  datasetId: id,
  datasetHash: z.string(),
  /** The one figure that it is listed by, with its interval; null where counts alone are given. */
  headline: z
    .object({
      label: z.string(),
      estimate: z.number(),
      lower: bound,
      upper: bound,
      unit: z.string().nullable(),
      decimals: count,
    })
    .nullable(),
  caution,
})
export type AnalysisSummary = z.infer<typeof analysisSummary>

/** An analysis that takes a while: under way, or ended without a result. */
export const analysisRun = z.object({
  /** The key that the stored analysis will have. */
  id,
  jobId: id,
  /** Null once it has ended: the queue then keeps nothing of the request. */
  title: z.string().nullable(),
  state: z.enum(JOB_STATES),
  progressDone: z.number().int(),
  progressTotal: z.number().int(),
  progressWords: z.string().nullable(),
  askedAt: instant,
  askedByName: z.string(),
  /** The reader asked for it, and may stop it. */
  own: z.boolean(),
  finishedAt: instant.nullable(),
  failure: z.string().nullable(),
})
export type AnalysisRun = z.infer<typeof analysisRun>

/** A stored analysis with all that it takes to read and to repeat it. */
export const analysis = analysisSummary.extend({
  parameters: analysisParameters,
  result: analysisResult,
  /** SHA-256 of the result in canonical JSON. */
  resultHash: z.string(),
  protocolVersion: z.number().int(),
  /** Analyte, direction and cut-off (or acceptance limits) are those of the protocol. */
  asProtocol: z.boolean(),
  targetCondition: z.string(),
  referenceStandard: z.string(),
  statisticsVersion: z.string(),
  seed: z.number().int(),
  frozenAt: instant,
  lockKind: z.enum(LOCK_KINDS),
})
export type Analysis = z.infer<typeof analysis>

/** What running a stored analysis again gave. */
export const analysisRepetition = z.object({
  same: z.boolean(),
  storedHash: z.string(),
  repeatedHash: z.string(),
  storedStatisticsVersion: z.string(),
  statisticsVersion: z.string(),
  /** Where the two differ, as paths into the result; empty when they are the same. */
  differences: z.array(z.object({ path: z.string(), stored: z.string(), repeated: z.string() })),
  repeatedAt: instant,
})
export type AnalysisRepetition = z.infer<typeof analysisRepetition>
