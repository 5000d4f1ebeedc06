import { z } from 'zod'
import {
  ACCEPTANCE_VERDICTS,
  ANALYSIS_BADGES,
  ANALYSIS_KINDS,
  CUT_OFF_RULES,
  MEASURES,
  SESSION_RULES,
} from '#shared/terms/analysis.ts'
import { LOCK_KINDS } from '#shared/terms/lockState.ts'
import { DIRECTIONS } from '#shared/terms/protocol.ts'
import { caution, id, instant, words } from './common.ts'
import { accuracyCounts, agreementCounts } from './dataset.ts'

const number = z.number({ error: 'Please give a number.' }).finite('Please give a number.')
const probability = number.gt(0, 'Must lie between 0 and 1.').lt(1, 'Must lie between 0 and 1.')

export const accuracyParameters = z.object({
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

export const agreementParameters = z.object({
  kind: z.literal('agreement'),
  analyteKey: z.string(),
  sessionRule: z.enum(SESSION_RULES),
  confidence: probability,
  /** Difference that would still be acceptable, in the analyte's unit. */
  acceptance: z
    .object({ lower: number, upper: number })
    .refine((limits) => limits.lower < limits.upper, {
      path: ['upper'],
      message: 'The upper limit must be above the lower one.',
    })
    .nullable(),
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

const count = z.number().int().nonnegative()
const bound = z.number().nullable()

/** A figure with its interval; where a part is null, `note` says why. */
const estimate = z.object({
  estimate: z.number().nullable(),
  lower: bound,
  upper: bound,
  method: z.string(),
  note: z.string().nullable(),
})

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
  area: estimate.extend({ estimate: z.number(), standardError: bound }).nullable(),
  areaWithheld: z.string().nullable(),
  /** Point by point from nobody positive to everybody; the first threshold is null. */
  curve: z.object({
    thresholds: z.array(z.number().nullable()),
    truePositives: z.array(count),
    falsePositives: z.array(count),
  }),
  /** Chosen from the data, so exploratory; empty where the area is withheld. */
  rules: z.array(ruleCutOffs),
})
export type AccuracyOverall = z.infer<typeof accuracyOverall>

const measured = { analyteName: z.string(), unit: z.string() }

export const accuracyResult = accuracyOverall.extend({
  kind: z.literal('accuracy'),
  ...measured,
  counts: accuracyCounts,
  /** As the protocol plans it for this analyte and direction. */
  plannedCutOff: z.number().nullable(),
  atCutOff: accuracyAtCutOffResult.nullable(),
})
export type AccuracyResult = z.infer<typeof accuracyResult>

const line = z.object({ estimate: z.number(), lower: z.number(), upper: z.number() })

/** Bias and limits of agreement; difference = sensor − reference, in the analyte's unit. */
export const agreementFigures = z.object({
  bias: line,
  sd: z.number(),
  lowerLimit: line,
  upperLimit: line,
  biasMethod: z.string(),
  limitsMethod: z.string(),
  acceptance: z
    .object({ lower: z.number(), upper: z.number(), verdict: z.enum(ACCEPTANCE_VERDICTS) })
    .nullable(),
  /** What has to be known about these limits, as sentences. */
  caveats: z.array(z.string()),
})
export type AgreementFigures = z.infer<typeof agreementFigures>

export const agreementResult = agreementFigures.extend({
  kind: z.literal('agreement'),
  ...measured,
  counts: agreementCounts,
})
export type AgreementResult = z.infer<typeof agreementResult>

export const analysisResult = z.discriminatedUnion('kind', [accuracyResult, agreementResult])
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
