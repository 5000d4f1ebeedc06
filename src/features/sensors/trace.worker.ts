import type { BesideNews } from '../../ui/useBeside.ts'
import { type TraceChoices, type TraceOutcome, traceOf } from './traceOf.ts'

export type TraceOrder = { source: File | string; choices: TraceChoices }

const tell = (news: BesideNews<TraceOutcome>) => self.postMessage(news)

/** Reads a trace chunk by chunk, beside the page. */
self.onmessage = async ({ data: { source, choices } }: MessageEvent<TraceOrder>) => {
  try {
    const outcome = await traceOf(typeof source === 'string' ? source : chunksOf(source), choices)
    tell({ outcome })
  } catch (error) {
    // A rejected promise does not reach the page's onerror; an error thrown by itself does.
    setTimeout(() => {
      throw error
    })
  }
}

/** Not every browser lets a stream be gone through by itself. */
async function* chunksOf(file: File): AsyncGenerator<Uint8Array> {
  const reader = file.stream().getReader()
  let bytes = 0
  for (;;) {
    const { done, value } = await reader.read()
    if (done) return
    bytes += value.length
    // Judging what was read takes the rest of the time.
    tell({ share: (0.8 * bytes) / file.size })
    yield value
  }
}
