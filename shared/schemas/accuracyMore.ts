import { z } from 'zod'
import { AREA_INTERVALS, CUT_OFF_RULES, SUBGROUPINGS } from '#shared/terms/analysis.ts'
import { areaEstimate, bound, count, estimate } from './estimate.ts'
import { resampling } from './resampling.ts'

const number = z.number({ error: 'Please give a number.' }).finite('Please give a number.')
const floor = number.min(0, 'From 0 to below 1.').lt(1, 'From 0 to below 1.').nullable()

/** What an accuracy analysis holds beyond curve, area and table; each part is asked for. */
export const accuracyOptions = z.object({
  areaInterval: z.enum(AREA_INTERVALS).default('delong'),
  /** Random draws for the cut-offs’ optimism and a bootstrap interval; null does without both. */
  resampling: resampling.nullable().default(null),
  /** Specificities between which a partial area is taken; null leaves more on the area out. */
  partialArea: z
    .object({ from: number.min(0, 'At least 0.'), to: number.max(1, 'At most 1.') })
    .refine(({ from, to }) => from < to, {
      path: ['to'],
      message: 'The second specificity must be above the first.',
    })
    .nullable()
    .default(null),
  /** Values in the zone, ends included, are indeterminate; a zone of null counts none as such. */
  troubledResults: z
    .object({
      zone: z
        .object({ lower: number, upper: number })
        .refine(({ lower, upper }) => lower < upper, {
          path: ['upper'],
          message: 'The upper end must be above the lower one.',
        })
        .nullable(),
    })
    .nullable()
    .default(null),
  subgroups: z.array(z.enum(SUBGROUPINGS)).default([]),
  /** Floors that the lower ends of the intervals must lie above; null where none is set. */
  floors: z
    .object({ sensitivity: floor, specificity: floor, area: floor })
    .refine((floors) => Object.values(floors).some((each) => each !== null), {
      path: ['sensitivity'],
      message: 'Set at least one floor, or none at all.',
    })
    .nullable()
    .default(null),
})
export type AccuracyOptions = z.infer<typeof accuracyOptions>

const rates = z.object({ sensitivity: z.number(), specificity: z.number() })

/** What a rule’s cut-off may be expected to do in other subjects. */
export const cutOffCorrections = z.object({
  rules: z.array(
    z.object({
      rule: z.enum(CUT_OFF_RULES),
      threshold: z.number().nullable(),
      apparent: rates,
      optimism: rates,
      corrected: rates,
    }),
  ),
  seed: count,
  replicates: count,
  method: z.string(),
  /** Why nothing was corrected; null where it was. */
  note: z.string().nullable(),
})
export type CutOffCorrections = z.infer<typeof cutOffCorrections>

/** One further figure of the area, with its method and source. */
const areaFigure = z.object({
  key: z.enum([
    'testAgainstHalf',
    'hanleyMcNeil',
    'mannWhitney',
    'partialArea',
    'partialAreaCorrected',
    'binormalCurve',
    'binormalRaw',
    'binormalLog',
  ]),
  label: z.string(),
  value: z.number().nullable(),
  /** p value, where it is a test. */
  p: z.number().nullable(),
  method: z.string(),
  source: z.string(),
  note: z.string().nullable(),
})
export const moreOnArea = z.object({
  figures: z.array(areaFigure),
  /** Why less is given than asked for. */
  note: z.string().nullable(),
})
export type MoreOnArea = z.infer<typeof moreOnArea>

const scenario = z.object({
  key: z.enum(['leftOut', 'countedPositive', 'countedNegative', 'best', 'worst']),
  sensitivity: estimate.extend({ numerator: count, denominator: count }),
  specificity: estimate.extend({ numerator: count, denominator: count }),
})
export const troubledResults = z.object({
  zone: z.object({ lower: z.number(), upper: z.number() }).nullable(),
  index: z.object({
    indeterminatePresent: count,
    indeterminateAbsent: count,
    noValidPresent: count,
    noValidAbsent: count,
    scenarios: z.array(scenario),
    determinate: estimate.extend({ numerator: count, denominator: count }),
    valid: estimate.extend({ numerator: count, denominator: count }),
  }),
  reference: z.object({
    indexPositive: count,
    indexNegative: count,
    scenarios: z.array(scenario),
  }),
})
export type TroubledResults = z.infer<typeof troubledResults>

export const subgroupTable = z.object({
  by: z.enum(SUBGROUPINGS),
  rows: z.array(
    z.object({
      /** Null where it is not recorded. */
      subgroup: z.string().nullable(),
      present: count,
      absent: count,
      /** Null with fewer than 10 in a class: counts alone are given then. */
      area: areaEstimate.nullable(),
      sensitivity: estimate.extend({ numerator: count, denominator: count }).nullable(),
      specificity: estimate.extend({ numerator: count, denominator: count }).nullable(),
    }),
  ),
})
export type SubgroupTable = z.infer<typeof subgroupTable>

export const successVerdict = z.object({
  met: z.boolean(),
  parts: z.array(
    z.object({
      measure: z.enum(['sensitivity', 'specificity', 'area']),
      floor: z.number(),
      estimate: bound,
      lower: bound,
      met: z.boolean(),
      sentence: z.string(),
    }),
  ),
})
export type SuccessVerdict = z.infer<typeof successVerdict>

/** Parts of a result that were asked for; absent where they were not. */
export const accuracyMore = z.object({
  corrections: cutOffCorrections.optional(),
  more: moreOnArea.optional(),
  troubled: troubledResults.optional(),
  subgroupTables: z.array(subgroupTable).optional(),
  success: successVerdict.optional(),
})
export type AccuracyMore = z.infer<typeof accuracyMore>
