import { analyses } from '#db/schema/analyses.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import type { DatasetRecord } from '#server/features/datasets/datasets.reads.ts'
import { holdStudy } from '#server/features/studies/studies.reads.ts'
import { drawsOf } from '#shared/analyses/drawsOf.ts'
import type { AnalysisRequest, AnalysisResult } from '#shared/schemas/analysis.ts'
import { statisticsVersion } from '#shared/statistics/statisticsVersion.ts'
import { nextAnalysisNumber } from './analyses.reads.ts'

/** Stored with analyses that draw nothing at random. */
const NO_DRAWS = 1

/** Stores a computed analysis with all that it takes to repeat it. @throws AppError already-exists */
export async function storeAnalysis(
  actor: Actor,
  dataset: DatasetRecord,
  { id, datasetId, title, parameters }: AnalysisRequest,
  computed: AnalysisResult,
): Promise<void> {
  const { studyId } = dataset
  const result = canonicalJson(computed)
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
      seed: drawsOf(parameters)?.seed ?? NO_DRAWS,
      result,
      resultHash: sha256Hex(result),
      runBy: actor.personId,
      runAt: tx.at,
    })
  })
}
