import { z } from 'zod'
import { PANEL_VALIDATIONS } from '#shared/terms/analysis.ts'
import { oneValueRule } from './comparison.ts'
import { accuracyCounts } from './dataset.ts'
import { bound, count, storedCurve } from './estimate.ts'
import { resampling } from './resampling.ts'

/** The outcome on several analytes by logistic regression. */
export const panelParameters = z.object({
  kind: z.literal('panel'),
  analyteKeys: z
    .array(z.string())
    .min(2, 'At least two analytes.')
    .max(6, 'At most six analytes.')
    .refine((keys) => new Set(keys).size === keys.length, { message: 'Each analyte once.' }),
  /** Values as they are, or their natural logarithms. */
  scale: z.enum(['raw', 'log']),
  sessionRule: oneValueRule,
  confidence: z.number().gt(0).lt(1, 'Must lie between 0 and 1.'),
  validation: z.enum(PANEL_VALIDATIONS),
  resampling,
})
export type PanelParameters = z.infer<typeof panelParameters>

export const panelResult = z.object({
  kind: z.literal('panel'),
  analyteName: z.string(),
  unit: z.string(),
  counts: accuracyCounts,
  terms: z.array(
    z.object({
      term: z.string(),
      estimate: z.number(),
      lower: z.number(),
      upper: z.number(),
      standardError: z.number(),
      p: z.number(),
      /** For one unit of the analyte, or for a factor of e on the log scale; null beyond numbers. */
      oddsRatio: bound,
      oddsRatioLower: bound,
      oddsRatioUpper: bound,
    }),
  ),
  /** Null with fewer than 10 in a class; `areaWithheld` says so. */
  area: z
    .object({
      /** With the flattery of fitting and judging on the same data taken off; it has no interval. */
      estimate: z.number(),
      lower: z.null(),
      upper: z.null(),
      /** On the data that the panel was fitted to: never to be shown alone. */
      apparent: z.number(),
      method: z.string(),
      replicates: count,
      /** Samples that could not be fitted, left out. */
      failed: count,
      seed: count,
    })
    .nullable(),
  areaWithheld: z.string().nullable(),
  /** Of the fitted probabilities, in the data that the panel was fitted to. */
  curve: storedCurve,
  brier: z.object({ brier: z.number(), scaled: z.number() }),
  calibration: z.object({
    slope: bound,
    intercept: bound,
    meanFitted: z.number(),
    prevalence: z.number(),
    note: z.string(),
  }),
  /** Null where subjects were sampled by outcome; `netBenefitHidden` says so. */
  netBenefit: z
    .array(
      z.object({
        threshold: z.number(),
        truePositives: count,
        falsePositives: count,
        netBenefit: z.number(),
        treatAll: z.number(),
      }),
    )
    .nullable(),
  netBenefitHidden: z.string().nullable(),
  likelihoodRatio: z.object({ chiSquared: z.number(), df: count, p: z.number() }),
  /** What has to be known, as sentences. */
  caveats: z.array(z.string()),
})
export type PanelResult = z.infer<typeof panelResult>
