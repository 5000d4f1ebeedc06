import { reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { getDataset } from '#server/features/datasets/datasets.reads.ts'
import { holdStudy } from '#server/features/studies/studies.reads.ts'
import { AppError, refuseField } from '#shared/errors/AppError.ts'
import type { AnalysisRepetition, AnalysisRequest } from '#shared/schemas/analysis.ts'
import { statisticsVersion } from '#shared/statistics/statisticsVersion.ts'
import { type AnalysisRow, getAnalysis, nextAnalysisNumber } from './analyses.reads.ts'
import { computeAnalysis } from './computeAnalysis.ts'
import { differencesOf } from './differencesOf.ts'

/** Stored with each analysis; no method of this version draws random numbers. */
const SEED = 1

/**
 * Runs an analysis on a locked dataset and stores it with all that it takes to repeat it.
 * @throws AppError invalid (no such dataset or analyte), statistics-refused, already-exists
 */
export async function runAnalysis(
  actor: Actor,
  studyId: string,
  { id, datasetId, title, parameters }: AnalysisRequest,
): Promise<AnalysisRow> {
  const dataset = await getDataset(reader(), datasetId).catch(noSuchDataset)
  if (dataset.studyId !== studyId) noSuchDataset(new AppError('not-found'))
  const result = canonicalJson(await computeAnalysis(reader(), dataset, parameters))
  await change({ actor, action: 'analysis.run', of: { studyId } }, async (tx) => {
    await holdStudy(tx.read, studyId)
    await tx.insert(analyses, {
      id,
      studyId,
      createdAt: tx.at,
      datasetId,
      number: await nextAnalysisNumber(tx.read, studyId),
      kind: parameters.kind,
      // A plan that is signed before the data are seen comes with the prospective study.
      badge: 'exploratory',
      title,
      parameters,
      protocolVersion: dataset.manifest.protocolVersion,
      statisticsVersion,
      seed: SEED,
      result,
      resultHash: sha256Hex(result),
      runBy: actor.personId,
      runAt: tx.at,
    })
  })
  return getAnalysis(reader(), id)
}

/** Another study's dataset is as if it did not exist. */
function noSuchDataset(error: unknown): never {
  if (error instanceof AppError && error.code === 'not-found')
    refuseField('datasetId', 'This study has no such dataset.')
  throw error
}

/** Runs a stored analysis again and says whether this build gives the same digits. */
export async function repeatAnalysis(
  actor: Actor,
  analysisId: string,
): Promise<AnalysisRepetition> {
  const stored = await getAnalysis(reader(), analysisId)
  const dataset = await getDataset(reader(), stored.datasetId)
  const result = await computeAnalysis(reader(), dataset, stored.parameters)
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
