import type { AgreementParameters, AgreementResult } from '#shared/schemas/agreement.ts'
import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import { agreementFiguresOf } from './agreementFiguresOf.ts'
import { agreementPairs } from './agreementPairs.ts'
import { frozenAnalyteOf } from './frozenAnalyteOf.ts'
import { requireSameMeasurand } from './sameMeasurand.ts'

/** @throws StatisticsError as agreementFiguresOf, and different-units (another reference analyte) */
export function agreementResultOf(
  rows: readonly DatasetRow[],
  analytes: DatasetManifest['analytes'],
  parameters: AgreementParameters,
): AgreementResult {
  const { analyteKey, referenceKey, sessionRule } = parameters
  const sensor = frozenAnalyteOf(analytes, analyteKey)
  requireSameMeasurand(sensor, frozenAnalyteOf(analytes, referenceKey ?? analyteKey))
  const pairs = agreementPairs(rows, analyteKey, sessionRule)
  return {
    kind: 'agreement',
    analyteName: sensor.name,
    unit: sensor.unit,
    counts: pairs.counts,
    ...agreementFiguresOf(pairs, parameters),
  }
}
