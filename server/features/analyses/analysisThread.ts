import { parentPort, workerData } from 'node:worker_threads'
import { resultOf } from '#shared/analyses/resultOf.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { ThreadWord, ThreadWork } from './computeInThread.ts'

/** One computation, away from whoever answers requests or works on jobs. */
const { frozen, parameters } = workerData as ThreadWork
const say = (word: ThreadWord) => parentPort?.postMessage(word)

try {
  say({ result: resultOf(frozen, parameters, (share) => say({ share })) })
} catch (error) {
  if (!(error instanceof StatisticsError)) throw error
  say({ refused: { code: error.code, message: error.message } })
}
