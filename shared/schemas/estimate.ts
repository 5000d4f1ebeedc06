import { z } from 'zod'

export const count = z.number().int().nonnegative()
export const bound = z.number().nullable()

/** A figure with its interval; where a part is null, `note` says why. */
export const estimate = z.object({
  estimate: z.number().nullable(),
  lower: bound,
  upper: bound,
  method: z.string(),
  note: z.string().nullable(),
})
export type Estimate = z.infer<typeof estimate>

/** The area under a curve with its interval. */
export const areaEstimate = estimate.extend({ estimate: z.number(), standardError: bound })
export type AreaEstimate = z.infer<typeof areaEstimate>

/** Point by point from nobody positive to everybody; the first threshold is null. */
export const storedCurve = z.object({
  thresholds: z.array(z.number().nullable()),
  truePositives: z.array(count),
  falsePositives: z.array(count),
})
export type StoredCurve = z.infer<typeof storedCurve>
