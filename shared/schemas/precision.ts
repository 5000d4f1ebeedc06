import { z } from 'zod'
import { caution, id } from './common.ts'
import { agreementCounts } from './dataset.ts'
import { bound, count, estimate } from './estimate.ts'

const probability = z
  .number({ error: 'Please give a number.' })
  .gt(0, 'Must lie between 0 and 1.')
  .lt(1, 'Must lie between 0 and 1.')

export const MEASURED_BY = ['sensor', 'reference'] as const
export type MeasuredBy = (typeof MEASURED_BY)[number]

export const precisionParameters = z.object({
  kind: z.literal('precision'),
  analyteKey: z.string(),
  /** Whose readings are looked at. */
  measuredBy: z.enum(MEASURED_BY),
  confidence: probability,
  /** For how many sessions it takes to reach it. */
  reliabilityWanted: probability,
  /** A stored accuracy analysis of the same dataset and analyte, to say what the noise costs. */
  accuracyId: id.nullable(),
})
export type PrecisionParameters = z.infer<typeof precisionParameters>

export const INTRACLASS_FORMS = [
  'single1',
  'single2',
  'single3',
  'mean1',
  'mean2',
  'mean3',
] as const
export type IntraclassForm = (typeof INTRACLASS_FORMS)[number]

/** What the sensor's noise costs an area, for normal values. */
export const noiseCost = z.object({
  analysisNumber: count,
  observedArea: z.number(),
  /** Null where the noise is as large as what was observed; `note` says so. */
  areaWithoutNoise: bound,
  /** Mean of so many sessions a subject. */
  expected: z.array(z.object({ sessions: count, area: z.number() })),
  note: z.string().nullable(),
})
export type NoiseCost = z.infer<typeof noiseCost>

/** How well readings repeat from session to session within subjects. */
export const precisionFigures = z.object({
  withinSubjectSd: estimate.extend({ estimate: z.number() }),
  repeatabilityCoefficient: z.number(),
  mean: z.number(),
  cvPercent: bound,
  cvLogPercent: bound,
  betweenSubjectSd: bound,
  /** One-way, of a single session; null where nothing varies. */
  reliability: bound,
  effectiveSessions: z.number(),
  /** Where every subject has the same number of sessions; else null. */
  intraclass: z.array(estimate.extend({ form: z.enum(INTRACLASS_FORMS) })).nullable(),
  sessionsEach: count.nullable(),
  sessionsForReliability: count.nullable(),
  noise: noiseCost.nullable(),
  caveats: z.array(z.string()),
})
export type PrecisionFigures = z.infer<typeof precisionFigures>

export const precisionResult = precisionFigures.extend({
  kind: z.literal('precision'),
  analyteName: z.string(),
  unit: z.string(),
  counts: agreementCounts,
})
export type PrecisionResult = z.infer<typeof precisionResult>

/** A share as it stands in an address, such as 0.9. */
const shareInAddress = z
  .string()
  .regex(/^0?\.\d{1,6}$/, 'Must lie between 0 and 1.')
  .transform(Number)
  .pipe(probability)

export const precisionQuery = z.object({
  analyteKey: z.string({ error: 'Please choose an analyte.' }).max(40),
  measuredBy: z.enum(MEASURED_BY).default('sensor'),
  confidence: shareInAddress.default(0.95),
  reliabilityWanted: shareInAddress.default(0.9),
  accuracyId: id.optional(),
})

/** Looked at, not stored. */
export const precisionExplored = z.object({
  parameters: precisionParameters,
  result: precisionResult,
  caution,
})
