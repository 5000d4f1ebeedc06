import { Worker } from 'node:worker_threads'
import type { Frozen } from '#shared/analyses/resultOf.ts'
import type { AnalysisParameters, AnalysisResult } from '#shared/schemas/analysis.ts'
import { StatisticsError, type StatisticsErrorCode } from '#shared/statistics/StatisticsError.ts'

export type ThreadWork = { frozen: Frozen; parameters: AnalysisParameters }
/** What the thread says: how far it is, and once how it ended. */
export type ThreadWord =
  | { share: number }
  | { result: AnalysisResult }
  | { refused: { code: StatisticsErrorCode; message: string } }

/** So many computations run at once on one machine; others wait for their turn. */
const MOST_AT_ONCE = 2
let running = 0
const waiting: (() => void)[] = []

/**
 * Computes in a thread of its own. What it draws cannot be interrupted from within, so stopping ends
 * the thread.
 * @param onProgress rejecting stops the computation, with that reason
 * @throws StatisticsError
 */
export async function computeInThread(
  frozen: Frozen,
  parameters: AnalysisParameters,
  onProgress: (share: number) => Promise<void> = async () => undefined,
): Promise<AnalysisResult> {
  if (running >= MOST_AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve))
  running += 1
  const worker = startThread({ frozen, parameters })
  try {
    return await endOf(worker, onProgress)
  } finally {
    await worker.terminate()
    running -= 1
    waiting.shift()?.()
  }
}

function endOf(
  worker: Worker,
  onProgress: (share: number) => Promise<void>,
): Promise<AnalysisResult> {
  return new Promise((resolve, reject) => {
    let isTelling = false
    worker.on('message', (word: ThreadWord) => {
      if ('result' in word) return resolve(word.result)
      if ('refused' in word)
        return reject(new StatisticsError(word.refused.code, word.refused.message))
      // Shares that come while the last one is still being written are passed over.
      if (isTelling) return
      isTelling = true
      void onProgress(word.share)
        .catch(reject)
        .finally(() => {
          isTelling = false
        })
    })
    worker.on('error', reject)
    worker.on('exit', () => reject(new Error('The computing thread ended without a result.')))
  })
}

/** TypeScript in development, the bundle beside this one in production. */
function startThread(workerData: ThreadWork): Worker {
  const bundled = import.meta.url.endsWith('.js')
  return bundled
    ? new Worker(new URL('./analysisThread.js', import.meta.url), { workerData })
    : new Worker(
        // On Node 20 a thread does not take tsx over from the process, nor by its arguments.
        `import { register } from 'tsx/esm/api'
         register()
         await import(${JSON.stringify(new URL('./analysisThread.ts', import.meta.url).href)})`,
        { eval: true, workerData },
      )
}
