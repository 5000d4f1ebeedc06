import { useMemo } from 'react'
import type { EntryProblems } from '../../forms/entries.ts'
import { type Beside, useBeside } from '../../ui/useBeside.ts'
import type { PlanTexts } from './planAddress.ts'
import type { PlanOrder } from './planning.worker.ts'
import { attemptPlan, type PlanOutcome, type PlanQuestion } from './planQuestion.ts'

export type PlanState =
  | { work: NonNullable<PlanOutcome['work']>; problems: null }
  | { work: null; problems: EntryProblems }
  | { work: null; problems: null; beside: Exclude<Beside<PlanOutcome>, { state: 'done' }> }

const startWorker = () =>
  new Worker(new URL('./planning.worker.ts', import.meta.url), { type: 'module' })

/** The outcome for what stands in the boxes; a slow question is worked out in a worker. */
export function usePlanOutcome(part: string, question: PlanQuestion, texts: PlanTexts): PlanState {
  const judgement = useMemo(() => question.judge(texts), [question, texts])
  const atOnce = useMemo(
    () =>
      judgement.values && !question.slow
        ? attemptPlan(question, judgement.values)
        : { work: null, problems: judgement.problems ?? {} },
    [question, judgement],
  )
  const order: PlanOrder | null =
    question.slow && judgement.values ? { part, ask: question.ask, values: judgement.values } : null
  const beside = useBeside<PlanOrder, PlanOutcome>(order, JSON.stringify(order), startWorker)
  if (order === null) return atOnce
  return beside.state === 'done' ? beside.outcome : { work: null, problems: null, beside }
}
