import type { Reader } from '#db/client.ts'
import {
  type DatasetRecord,
  frozenAnalyte,
  readDatasetRows,
} from '#server/features/datasets/datasets.reads.ts'
import { analytesOf } from '#shared/analyses/analytesOf.ts'
import { drawsOf } from '#shared/analyses/drawsOf.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import { resultOf } from '#shared/analyses/resultOf.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { AnalysisParameters, AnalysisResult } from '#shared/schemas/analysis.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { computeInThread } from './computeInThread.ts'
import { storedAreaFor } from './storedArea.ts'

/** @throws AppError invalid, at the field of an analyte that the dataset does not hold */
export function requireAnalytes(dataset: DatasetRecord, parameters: AnalysisParameters): void {
  for (const { key, field } of analytesOf(parameters))
    frozenAnalyte(dataset.manifest, key, `parameters.${field}`)
}

/**
 * Computes an analysis from frozen rows alone: what draws at random in a thread of its own, since it
 * would hold up others, the rest at once.
 * @param onProgress told the share done, one call after the other; rejecting stops the computation
 * @throws AppError invalid (no such analyte), statistics-refused
 */
export async function computeAnalysis(
  read: Reader,
  { id, manifest, protocol }: DatasetRecord,
  parameters: AnalysisParameters,
  onProgress?: (share: number) => Promise<void>,
): Promise<AnalysisResult> {
  const frozen = {
    manifest,
    protocol,
    rows: await readDatasetRows(read, id),
    storedArea: await storedAreaFor(read, id, parameters),
  }
  try {
    return drawsOf(parameters)
      ? await computeInThread(frozen, parameters, onProgress)
      : resultOf(frozen, parameters)
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    throw new AppError('statistics-refused', { message: refusalSentence(error) })
  }
}
