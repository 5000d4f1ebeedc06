import { z } from 'zod'
import { DIRECTIONS } from '#shared/terms/protocol.ts'
import { accuracyCounts } from './dataset.ts'
import { areaEstimate, bound, count, estimate, storedCurve } from './estimate.ts'
import { resampling } from './resampling.ts'

const marker = z.object({ analyteKey: z.string(), direction: z.enum(DIRECTIONS) })
const level = z.string().min(1, 'Please choose a group.').max(200)
/** One value for each subject: areas of several sessions cannot be compared pair by pair. */
export const oneValueRule = z.enum(['first', 'mean', 'median'])

/** Areas of several biomarkers in the same subjects, or of one in two groups of subjects. */
export const comparisonParameters = z.object({
  kind: z.literal('comparison'),
  sessionRule: oneValueRule,
  confidence: z.number().gt(0).lt(1, 'Must lie between 0 and 1.'),
  compare: z.discriminatedUnion('design', [
    z.object({
      design: z.literal('paired'),
      markers: z
        .array(marker)
        .min(2, 'At least two biomarkers.')
        .max(4, 'At most four biomarkers.')
        .refine((all) => new Set(all.map((each) => each.analyteKey)).size === all.length, {
          message: 'Each analyte once.',
        }),
      /** More than one of these comparisons is primary: their p values are adjusted. */
      adjust: z.boolean(),
      /** Permutations of Venkatraman’s test; null leaves it out. */
      permutations: resampling.nullable(),
    }),
    z.object({
      design: z.literal('independent'),
      marker,
      by: z.discriminatedUnion('kind', [
        z.object({ kind: z.literal('site') }),
        z.object({ kind: z.literal('sex') }),
        z.object({ kind: z.literal('covariate'), name: z.string().max(200) }),
      ]),
      groups: z.tuple([level, level]).refine(([one, other]) => one !== other, {
        path: [1],
        message: 'Choose another group than the first.',
      }),
    }),
  ]),
})
export type ComparisonParameters = z.infer<typeof comparisonParameters>

export const comparisonResult = z.object({
  kind: z.literal('comparison'),
  analyteName: z.string(),
  unit: z.string(),
  counts: accuracyCounts,
  /** One for each biomarker or group. */
  curves: z.array(
    z.object({
      label: z.string(),
      unit: z.string(),
      direction: z.enum(DIRECTIONS),
      present: count,
      absent: count,
      /** Null with fewer than 10 in a class. */
      area: areaEstimate.nullable(),
      curve: storedCurve,
    }),
  ),
  /** Why areas are withheld; null where they are given. */
  areaWithheld: z.string().nullable(),
  /** Each pair of curves; empty where areas are withheld. */
  comparisons: z.array(
    z.object({
      /** Places of the two in `curves`. */
      first: count,
      second: count,
      /** First area less the second. */
      difference: estimate.extend({ estimate: z.number() }),
      statistic: bound,
      degreesOfFreedom: bound,
      p: bound,
      pAdjusted: bound,
      permutation: z
        .object({ statistic: z.number(), p: z.number(), permutations: count, seed: count })
        .nullable(),
    }),
  ),
})
export type ComparisonResult = z.infer<typeof comparisonResult>
