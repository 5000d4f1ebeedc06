import { useState } from 'react'
import { useBeside } from '../../ui/useBeside.ts'
import type { TraceOrder } from './trace.worker.ts'
import type { TraceChoices, TraceOutcome } from './traceOf.ts'

const startWorker = () =>
  new Worker(new URL('./trace.worker.ts', import.meta.url), { type: 'module' })

/** A trace, dropped or pasted, read in a worker whenever it or a choice changes. */
export function useTrace(choices: TraceChoices | null) {
  const [given, setGiven] = useState<{ source: File | string; turn: number }>({
    source: '',
    turn: 0,
  })
  const give = (source: File | string) => setGiven(({ turn }) => ({ source, turn: turn + 1 }))
  const { source, turn } = given
  const order: TraceOrder | null = source !== '' && choices ? { source, choices } : null
  const work = useBeside<TraceOrder, TraceOutcome>(
    order,
    `${turn} ${JSON.stringify(choices)}`,
    startWorker,
  )
  return {
    file: typeof source === 'string' ? null : source,
    text: typeof source === 'string' ? source : '',
    onFile: (file: File | null) => give(file ?? ''),
    onText: give,
    work: order ? work : null,
  }
}
