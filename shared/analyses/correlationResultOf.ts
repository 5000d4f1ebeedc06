import type { CorrelationParameters, CorrelationResult } from '#shared/schemas/agreement.ts'
import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import { AGREEMENT_METHODS } from '#shared/statistics/agreement/AGREEMENT_METHODS.ts'
import { spearman } from '#shared/statistics/agreement/spearman.ts'
import { type AgreementPairs, agreementPairs } from './agreementPairs.ts'
import { frozenAnalyteOf } from './frozenAnalyteOf.ts'

type Figures = Pick<CorrelationResult, 'rankCorrelation' | 'p'>

/** @throws StatisticsError too-few, constant */
export function correlationResultOf(
  rows: readonly DatasetRow[],
  analytes: DatasetManifest['analytes'],
  { analyteKey, referenceKey, sessionRule, confidence }: CorrelationParameters,
): CorrelationResult {
  const sensor = frozenAnalyteOf(analytes, analyteKey)
  const reference = frozenAnalyteOf(analytes, referenceKey)
  const pairs = agreementPairs(rows, analyteKey, sessionRule, referenceKey)
  return {
    kind: 'correlation',
    analyteName: sensor.name,
    unit: sensor.unit,
    referenceName: reference.name,
    referenceUnit: reference.unit,
    counts: pairs.counts,
    ...rankCorrelationOf(pairs, confidence),
  }
}

/**
 * Whether subjects with more of the one have more of the other: the ranks correlated, one pair of each
 * subject. Measurands and units may differ.
 * @throws StatisticsError too-few, constant
 */
export function rankCorrelationOf(
  { sensor, reference }: Pick<AgreementPairs, 'sensor' | 'reference'>,
  level: number,
): Figures {
  const { rho, interval, p } = spearman({ first: sensor, second: reference }, { level })
  return {
    rankCorrelation: {
      estimate: rho,
      lower: interval?.lower ?? null,
      upper: interval?.upper ?? null,
      method: AGREEMENT_METHODS.spearman.name,
      note: interval
        ? null
        : 'No interval: the ranks agree completely, or there are fewer than 4 pairs.',
    },
    p,
  }
}
