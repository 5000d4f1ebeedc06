import { expect } from 'vitest'
import { planQuestionAt } from '../../src/features/planning/planParts.ts'
import {
  attemptPlan,
  type PlanOutcome,
  type PlanQuestion,
  type PlanWork,
} from '../../src/features/planning/planQuestion.ts'

/** What the page shows for what is typed; a number for every box that is named. */
export function worked(address: string, typed: Record<string, number | string> = {}): PlanWork {
  const question = questionAt(address)
  const outcome = outcomeOf(question, typed)
  expect(outcome.problems).toBeNull()
  return outcome.work!
}

export function outcomeOf(
  question: PlanQuestion,
  typed: Record<string, number | string>,
): PlanOutcome {
  const texts = Object.fromEntries(Object.entries(typed).map(([name, each]) => [name, `${each}`]))
  const { values, problems } = question.judge(texts)
  return values ? attemptPlan(question, values) : { work: null, problems }
}

export function questionAt(address: string): PlanQuestion {
  const [part, ask] = address.split('/')
  return planQuestionAt(part!, ask!)!
}

export const figures = (work: PlanWork) => work.answer.figures.map(({ value }) => value)
