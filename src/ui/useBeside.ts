import { useEffect, useState } from 'react'

/** What a worker says: how far it is, and at last what came out. */
export type BesideNews<Outcome> = { share: number } | { outcome: Outcome }

export type Beside<Outcome> =
  | { state: 'done'; outcome: Outcome }
  | { state: 'working'; share: number; cancel: () => void }
  | { state: 'stopped'; why: string; again: () => void }

type Run<Outcome> = {
  key: string
  share: number
  outcome: Outcome | null
  stopped: string | null
}

/** Typing goes on for a moment: the work begins when it rests. */
const REST_MS = 150

/**
 * Has an order done by a worker of its own, so that the page stays awake. The worker ends with the next
 * order, when somebody cancels, and when the page is left.
 * @param order what the worker is sent, or null while there is nothing to do
 * @param key tells one order from another  @param start makes the worker; must not change
 */
export function useBeside<Order, Outcome>(
  order: Order | null,
  key: string,
  start: () => Worker,
): Beside<Outcome> {
  const [attempt, setAttempt] = useState(0)
  const [run, setRun] = useState<Run<Outcome> | null>(null)
  const idle = order === null
  const stopped = run?.key === key ? run.stopped : null
  // biome-ignore lint/correctness/useExhaustiveDependencies: the key stands for the order; another attempt runs it again
  useEffect(() => {
    if (idle || stopped) return
    const change = (changes: Partial<Run<Outcome>>) =>
      setRun((before) => ({
        ...(before?.key === key ? before : { key, share: 0, outcome: null, stopped: null }),
        ...changes,
      }))
    change({ share: 0, outcome: null })
    let worker: Worker | undefined
    const rest = setTimeout(() => {
      worker = start()
      worker.onmessage = ({ data }: MessageEvent<BesideNews<Outcome>>) => change(data)
      worker.onerror = () => change({ stopped: 'The computation broke off.' })
      worker.postMessage(order)
    }, REST_MS)
    return () => {
      clearTimeout(rest)
      worker?.terminate()
    }
  }, [idle, key, attempt, stopped, start])

  const now = run?.key === key ? run : null
  if (now?.outcome) return { state: 'done', outcome: now.outcome }
  if (stopped) {
    const again = () => {
      setRun(null)
      setAttempt((count) => count + 1)
    }
    return { state: 'stopped', why: stopped, again }
  }
  return {
    state: 'working',
    share: now?.share ?? 0,
    cancel: () => setRun({ key, share: 0, outcome: null, stopped: 'You stopped it.' }),
  }
}
