import { reader } from '#db/client.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { getDataset } from '#server/features/datasets/datasets.reads.ts'
import { drawsOf } from '#shared/analyses/drawsOf.ts'
import { refuseField } from '#shared/errors/AppError.ts'
import {
  type AnalysisRepetition,
  type AnalysisRequest,
  analysisParameters,
} from '#shared/schemas/analysis.ts'
import { statisticsVersion } from '#shared/statistics/statisticsVersion.ts'
import { type AnalysisRow, getAnalysis } from './analyses.reads.ts'
import { computeAnalysis, requireAnalytes } from './computeAnalysis.ts'
import { datasetOf } from './datasetOf.ts'
import { differencesOf } from './differencesOf.ts'
import { storeAnalysis } from './storeAnalysis.ts'

/**
 * Runs an analysis on a locked dataset and stores it with all that it takes to repeat it.
 * @throws AppError invalid (no such dataset or analyte; draws at random), statistics-refused, already-exists
 */
export async function runAnalysis(
  actor: Actor,
  studyId: string,
  request: AnalysisRequest,
): Promise<AnalysisRow> {
  const dataset = await datasetOf(studyId, request.datasetId)
  requireAnalytes(dataset, request.parameters)
  if (drawsOf(request.parameters))
    refuseField('parameters', 'This draws at random and takes a while: ask for it as a run.')
  const result = await computeAnalysis(reader(), dataset, request.parameters)
  await storeAnalysis(actor, dataset, request, result)
  return getAnalysis(reader(), request.id)
}

/** Runs a stored analysis again and says whether this build gives the same digits. */
export async function repeatAnalysis(
  actor: Actor,
  analysisId: string,
): Promise<AnalysisRepetition> {
  const stored = await getAnalysis(reader(), analysisId)
  const dataset = await getDataset(reader(), stored.datasetId)
  const result = await computeAnalysis(
    reader(),
    dataset,
    // What was stored before an option was there gets the option’s usual choice.
    analysisParameters.parse(stored.parameters),
  )
  const repeated = canonicalJson(result)
  const repeatedAt = await change(
    { actor, action: 'analysis.repeat', of: { analysisId } },
    async (tx) => {
      tx.note({
        recordType: 'analysis',
        recordId: analysisId,
        recordLabel: `no. ${stored.number}`,
        fields: [
          { field: 'sameDigits', informationClass: 'none', new: repeated === stored.result },
          { field: 'statisticsVersion', informationClass: 'none', new: statisticsVersion },
        ],
      })
      return tx.at
    },
  )
  return {
    same: repeated === stored.result,
    storedHash: stored.resultHash,
    repeatedHash: sha256Hex(repeated),
    storedStatisticsVersion: stored.statisticsVersion,
    statisticsVersion,
    differences: differencesOf(JSON.parse(stored.result), JSON.parse(repeated)),
    repeatedAt: repeatedAt.toISOString(),
  }
}
