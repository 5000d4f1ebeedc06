import { z } from 'zod'
import {
  AGREEMENT_SCALES,
  FITTED_LINES,
  SPREADS,
  TRUE_VALUES,
} from '#shared/terms/agreementTerms.ts'
import { ACCEPTANCE_VERDICTS, SESSION_RULES } from '#shared/terms/analysis.ts'
import { agreementCounts } from './dataset.ts'
import { bound, count, estimate } from './estimate.ts'

const number = z.number({ error: 'Please give a number.' }).finite('Please give a number.')
const probability = number.gt(0, 'Must lie between 0 and 1.').lt(1, 'Must lie between 0 and 1.')
const MOST_LEVELS = 6

/** What was added later has a default, so that earlier stored analyses read and repeat as they were. */
export const agreementParameters = z.object({
  kind: z.literal('agreement'),
  analyteKey: z.string(),
  /** Analyte of the reference values; null is the same one, and another one is refused. */
  referenceKey: z.string().nullable().default(null),
  sessionRule: z.enum(SESSION_RULES),
  confidence: probability,
  scale: z.enum(AGREEMENT_SCALES).default('difference'),
  /** Counts where every session goes in and some subject has several. */
  trueValue: z.enum(TRUE_VALUES).default('varying'),
  /** Counts for limits by regression. */
  spread: z.enum(SPREADS).default('changing'),
  /** Error variance of the sensor divided by that of the reference. */
  errorVarianceRatio: number.positive('Must lie above 0.').default(1),
  /** Reference values, in the analyte's unit, at which the bias is wanted. */
  decisionLevels: z.array(number).max(MOST_LEVELS, `At most ${MOST_LEVELS}.`).default([]),
  /** Difference that would still be acceptable, in the unit of the scale. */
  acceptance: z
    .object({ lower: number, upper: number })
    .refine((limits) => limits.lower < limits.upper, {
      path: ['upper'],
      message: 'The upper limit must be above the lower one.',
    })
    .nullable(),
})
export type AgreementParameters = z.infer<typeof agreementParameters>

/** Height of a line at the centre, its interval, and its change per unit of the mean. */
const line = z.object({
  estimate: z.number(),
  lower: bound,
  upper: bound,
  slope: z.number().default(0),
})
export type AgreementLineFigures = z.infer<typeof line>

const plainLine = z.object({ estimate: bound, lower: bound, upper: bound })

/** Regression of the sensor on the reference, correlations and bias at levels; one pair a subject. */
export const methodComparison = z.object({
  lines: z.array(
    z.object({
      line: z.enum(FITTED_LINES),
      intercept: plainLine,
      slope: plainLine,
      method: z.string(),
      note: z.string().nullable(),
    }),
  ),
  levels: z.array(plainLine.extend({ level: z.number(), percent: bound })),
  /** SD of the differences, in the analyte's unit. */
  sd: z.number(),
  concordance: estimate,
  pearson: estimate,
  spearman: estimate,
})
export type MethodComparison = z.infer<typeof methodComparison>

/** Bias and limits of agreement on a scale; difference = sensor − reference. */
export const agreementFigures = z.object({
  scale: z.enum(AGREEMENT_SCALES).default('difference'),
  /** Of the lines, as a code; null is the analyte's own unit. */
  differenceUnit: z.string().nullable().default(null),
  bias: line,
  sd: z.number(),
  lowerLimit: line,
  upperLimit: line,
  /** The mean at which sloping lines have their heights. */
  centre: bound.default(null),
  /** Sloping lines at the smallest, the middle and the largest mean. */
  alongMean: z
    .array(z.object({ mean: z.number(), bias: line, lowerLimit: line, upperLimit: line }))
    .default([]),
  biasMethod: z.string(),
  limitsMethod: z.string(),
  /** Where several sessions of a subject went in. */
  replicates: z
    .object({
      trueValue: z.enum(TRUE_VALUES),
      subjects: count,
      pairs: count,
      /** SD within subjects: of the differences (varying), or of each method's readings (constant). */
      withinDifferences: bound,
      withinSensor: bound,
      withinReference: bound,
    })
    .nullable()
    .default(null),
  /** Shapiro–Wilk of the differences on this scale; null where the test does not apply. */
  normality: z.object({ w: z.number(), p: z.number() }).nullable().default(null),
  /** Slope of the difference on the mean, a sign of proportional bias. */
  slopeOnMean: z
    .object({ slope: z.number(), lower: z.number(), upper: z.number(), p: bound })
    .nullable()
    .default(null),
  comparison: methodComparison.nullable().default(null),
  /** Why there is no comparison of the two methods by lines; null where there is. */
  comparisonWithheld: z.string().nullable().default(null),
  acceptance: z
    .object({ lower: z.number(), upper: z.number(), verdict: z.enum(ACCEPTANCE_VERDICTS) })
    .nullable(),
  /** What has to be known about these limits, as sentences. */
  caveats: z.array(z.string()),
})
export type AgreementFigures = z.infer<typeof agreementFigures>

export const agreementResult = agreementFigures.extend({
  kind: z.literal('agreement'),
  analyteName: z.string(),
  unit: z.string(),
  counts: agreementCounts,
})
export type AgreementResult = z.infer<typeof agreementResult>

/** Rank correlation: what can be said of two different measurands. */
export const correlationParameters = z.object({
  kind: z.literal('correlation'),
  analyteKey: z.string(),
  referenceKey: z.string(),
  sessionRule: z.enum(SESSION_RULES).exclude(['every']),
  confidence: probability,
})
export type CorrelationParameters = z.infer<typeof correlationParameters>

export const correlationFigures = z.object({
  rankCorrelation: estimate.extend({ estimate: z.number() }),
  p: bound,
})

export const correlationResult = correlationFigures.extend({
  kind: z.literal('correlation'),
  analyteName: z.string(),
  unit: z.string(),
  referenceName: z.string(),
  referenceUnit: z.string(),
  counts: agreementCounts,
})
export type CorrelationResult = z.infer<typeof correlationResult>
