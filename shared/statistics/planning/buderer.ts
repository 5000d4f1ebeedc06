import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import { requireProbability } from '../requireProbability.ts'

export type BudererPlan = {
  sensitivity: number
  sensitivityHalfWidth: number
  specificity: number
  specificityHalfWidth: number
  prevalence: number
}

export type BudererSize = {
  presentExact: number
  present: number
  absentExact: number
  absent: number
  /** Subjects of both outcomes to enrol; from exact and from rounded-up numbers. */
  totalForSensitivity: number
  totalForSensitivityRounded: number
  totalForSpecificity: number
  totalForSpecificityRounded: number
}

/**
 * Subjects for a sensitivity and a specificity at a wanted precision: z²·p(1 − p)/d² of each outcome, and
 * how many to enrol at a prevalence.
 * @param plan all strictly between 0 and 1
 * @throws StatisticsError 'out-of-range'
 * Source: Buderer 1996, Acad Emerg Med 3:895.
 */
export function buderer(plan: BudererPlan, { level = 0.95 }: LevelOption = {}): BudererSize {
  for (const value of Object.values(plan)) requireProbability(value, 'Each figure of the plan')
  const z = zFor(level)
  const { sensitivity: se, specificity: sp, prevalence } = plan
  const presentExact = (z * z * se * (1 - se)) / plan.sensitivityHalfWidth ** 2
  const absentExact = (z * z * sp * (1 - sp)) / plan.specificityHalfWidth ** 2
  const present = Math.ceil(presentExact)
  const absent = Math.ceil(absentExact)
  // 1e-9 keeps the rounding of a quotient from adding a subject
  const enrol = (count: number, share: number) => Math.ceil(count / share - 1e-9)
  return {
    presentExact,
    present,
    absentExact,
    absent,
    totalForSensitivity: enrol(presentExact, prevalence),
    totalForSensitivityRounded: enrol(present, prevalence),
    totalForSpecificity: enrol(absentExact, 1 - prevalence),
    totalForSpecificityRounded: enrol(absent, 1 - prevalence),
  }
}
