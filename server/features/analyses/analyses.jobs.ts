import { eq } from 'drizzle-orm'
import { reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import type { JobHandler } from '#server/jobs/runner.ts'
import type { AnalysisRequest } from '#shared/schemas/analysis.ts'
import { computeAnalysis } from './computeAnalysis.ts'
import { datasetOf } from './datasetOf.ts'
import { storeAnalysis } from './storeAnalysis.ts'

/** Shares are told in thousandths, in whole numbers. */
const TOTAL = 1_000

/** Computes an analysis that draws at random, and stores it under the key that was asked for. */
export const analysisRun: JobHandler = {
  run: async ({ actor, job, progress }) => {
    const request = job.payload.request as AnalysisRequest
    // A worker that was cut off after it had stored the analysis leaves nothing to do.
    const [stored] = await reader()
      .select({ id: analyses.id })
      .from(analyses)
      .where(eq(analyses.id, request.id))
    if (stored) return
    await progress(0, TOTAL, 'Reading the dataset')
    const dataset = await datasetOf(job.studyId, request.datasetId)
    const result = await computeAnalysis(reader(), dataset, request.parameters, (share) =>
      progress(Math.floor(share * TOTAL), TOTAL, 'Computing'),
    )
    await progress(TOTAL, TOTAL, 'Storing the result')
    await storeAnalysis(actor, dataset, request, result)
  },

  // Until it is stored an analysis is its job alone, so the job's end says everything.
  ended: async () => undefined,
}
