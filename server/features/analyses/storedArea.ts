import { and, eq } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import type { StoredArea } from '#shared/analyses/noiseCostOf.ts'
import { refuseField } from '#shared/errors/AppError.ts'
import {
  type AnalysisParameters,
  analysisParameters,
  analysisResult,
} from '#shared/schemas/analysis.ts'

/**
 * The stored accuracy analysis that a precision analysis is set against; null where it names none, and
 * for every other kind.
 * @throws AppError invalid, where this dataset has no such accuracy analysis of this analyte
 */
export async function storedAreaFor(
  read: Reader,
  datasetId: string,
  parameters: AnalysisParameters,
): Promise<StoredArea | null> {
  if (parameters.kind !== 'precision' || parameters.accuracyId === null) return null
  const [row] = await read
    .select({ number: analyses.number, parameters: analyses.parameters, result: analyses.result })
    .from(analyses)
    .where(and(eq(analyses.id, parameters.accuracyId), eq(analyses.datasetId, datasetId)))
  const asked = row && analysisParameters.parse(row.parameters)
  const result = row && analysisResult.parse(JSON.parse(row.result))
  if (asked?.kind !== 'accuracy' || result?.kind !== 'accuracy')
    refuseField('parameters.accuracyId', 'This dataset has no such accuracy analysis.')
  if (asked.analyteKey !== parameters.analyteKey)
    refuseField('parameters.accuracyId', 'That accuracy analysis is of another analyte.')
  if (parameters.measuredBy !== 'sensor')
    refuseField(
      'parameters.accuracyId',
      'Areas are of the sensor’s values: choose the sensor’s readings, or no accuracy analysis.',
    )
  return {
    number: row!.number,
    area: result.area?.estimate ?? null,
    analyteKey: asked.analyteKey,
    sessionRule: asked.sessionRule,
  }
}
