import { useEffect, useMemo, useState } from 'react'
import type { PlanTexts } from './planAddress.ts'
import type { PlanNews, PlanOrder } from './planning.worker.ts'
import { attemptPlan, type PlanOutcome, type PlanQuestion } from './planQuestion.ts'

export type PlanState =
  | PlanOutcome
  | { work: null; problems: null; share: number; cancel: () => void }
  | { work: null; problems: null; stopped: string; again: () => void }

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
  const beside = useBeside(
    question.slow && judgement.values
      ? JSON.stringify({ part, ask: question.ask, values: judgement.values } satisfies PlanOrder)
      : null,
  )
  return question.slow && judgement.values ? beside : atOnce
}

type Run = { order: string; share: number; outcome: PlanOutcome | null; stopped: string | null }

/** Typing goes on for a moment: the work begins when it rests. */
const REST_MS = 150

/** Runs an order in a worker of its own, which ends with the next order or when it is cancelled. */
function useBeside(order: string | null): PlanState {
  const [attempt, setAttempt] = useState(0)
  const [run, setRun] = useState<Run | null>(null)
  // biome-ignore lint/correctness/useExhaustiveDependencies: another attempt at the same order runs it again
  useEffect(() => {
    if (order === null) return
    const change = (changes: Partial<Run>) =>
      setRun((before) => ({
        ...(before?.order === order ? before : { order, share: 0, outcome: null, stopped: null }),
        ...changes,
      }))
    change({ share: 0, outcome: null, stopped: null })
    let worker: Worker | undefined
    const rest = setTimeout(() => {
      worker = new Worker(new URL('./planning.worker.ts', import.meta.url), { type: 'module' })
      worker.onmessage = ({ data }: MessageEvent<PlanNews>) => change(data)
      worker.onerror = () => change({ stopped: 'The computation broke off.' })
      worker.postMessage(JSON.parse(order))
    }, REST_MS)
    return () => {
      clearTimeout(rest)
      worker?.terminate()
    }
  }, [order, attempt])

  const now = run?.order === order ? run : null
  if (now?.outcome) return now.outcome
  if (now?.stopped)
    return {
      work: null,
      problems: null,
      stopped: now.stopped,
      again: () => setAttempt((count) => count + 1),
    }
  return {
    work: null,
    problems: null,
    share: now?.share ?? 0,
    cancel: () => setRun((before) => before && { ...before, stopped: 'You stopped it.' }),
  }
}
