import type { ProportionEstimate } from '#shared/statistics/proportions/proportionEstimate.ts'

/** A proportion as results store it. */
export const proportionOf = ({
  numerator,
  denominator,
  estimate,
  lower,
  upper,
  method,
  notDefined,
}: ProportionEstimate) => ({
  numerator,
  denominator,
  estimate,
  lower,
  upper,
  method,
  note: notDefined?.sentence ?? null,
})
