import { formatCount, formatPercent } from '#shared/terms/numbers.ts'

export type Classes = { present: number; absent: number }
export type EnrolmentAssumptions = {
  prevalence: number | undefined
  /** Percent. */
  withoutResult: number | undefined
}

/** Keeps the rounding of a quotient from adding a subject. */
const up = (value: number) => Math.ceil(value - 1e-9)

/**
 * How many to enrol so that the subjects needed are left to analyse, and, where subjects come in the order
 * of their arrival, so that both classes fill.
 */
export function enrolment(
  needed: Classes,
  { prevalence, withoutResult = 0 }: EnrolmentAssumptions,
): Classes & { total: number } {
  const share = 1 - withoutResult / 100
  const present = up(needed.present / share)
  const absent = up(needed.absent / share)
  const total =
    prevalence === undefined
      ? present + absent
      : Math.max(
          up(needed.present / share / prevalence),
          up(needed.absent / share / (1 - prevalence)),
        )
  return { present, absent, total }
}

/** In words, and nothing where no assumption was made. */
export function enrolmentNote(needed: Classes, assumptions: EnrolmentAssumptions): string[] {
  const { prevalence, withoutResult } = assumptions
  const { present, absent, total } = enrolment(needed, assumptions)
  const losses = withoutResult ? `, with ${withoutResult} % without a valid result` : ''
  if (prevalence !== undefined)
    return [
      `Enrol ${formatCount(total)} subjects in order, so that both classes fill at a prevalence of ${formatPercent(prevalence)}${losses}. That is an expectation: plan a margin.`,
    ]
  if (!losses) return []
  return [
    `Enrol ${formatCount(present)} with the condition and ${formatCount(absent)} without${losses}.`,
  ]
}
