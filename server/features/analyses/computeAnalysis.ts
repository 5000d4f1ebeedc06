import type { Reader } from '#db/client.ts'
import {
  type DatasetRecord,
  frozenAnalyte,
  readDatasetRows,
} from '#server/features/datasets/datasets.reads.ts'
import { accuracyAtCutOffOf } from '#shared/analyses/accuracyAtCutOffOf.ts'
import { accuracyOverallOf } from '#shared/analyses/accuracyOverallOf.ts'
import { accuracyValues } from '#shared/analyses/accuracyValues.ts'
import { agreementFiguresOf } from '#shared/analyses/agreementFiguresOf.ts'
import { agreementPairs } from '#shared/analyses/agreementPairs.ts'
import { plannedCutOff } from '#shared/analyses/asProtocol.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type {
  AccuracyParameters,
  AccuracyResult,
  AgreementParameters,
  AgreementResult,
  AnalysisParameters,
  AnalysisResult,
} from '#shared/schemas/analysis.ts'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'

type Of<P> = { dataset: DatasetRecord; rows: readonly DatasetRow[]; parameters: P }

/**
 * Computes an analysis from frozen rows alone: the same dataset, parameters and build give the same
 * digits.
 * @throws AppError invalid (no such analyte), statistics-refused
 */
export async function computeAnalysis(
  read: Reader,
  dataset: DatasetRecord,
  parameters: AnalysisParameters,
): Promise<AnalysisResult> {
  frozenAnalyte(dataset.manifest, parameters.analyteKey, 'parameters.analyteKey')
  const rows = await readDatasetRows(read, dataset.id)
  try {
    return parameters.kind === 'accuracy'
      ? accuracyResult({ dataset, rows, parameters })
      : agreementResult({ dataset, rows, parameters })
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    throw new AppError('statistics-refused', { message: refusalSentence(error) })
  }
}

function accuracyResult({ dataset, rows, parameters }: Of<AccuracyParameters>): AccuracyResult {
  const { analyteKey, sessionRule, cutOff } = parameters
  const { sampling } = dataset.protocol
  const values = accuracyValues(rows, analyteKey, sessionRule)
  return {
    kind: 'accuracy',
    ...measured(dataset, analyteKey),
    counts: values.counts,
    plannedCutOff: plannedCutOff(dataset.protocol, parameters),
    ...accuracyOverallOf(values, parameters),
    atCutOff:
      cutOff === null ? null : accuracyAtCutOffOf(values, cutOff, { ...parameters, sampling }),
  }
}

function agreementResult({ dataset, rows, parameters }: Of<AgreementParameters>): AgreementResult {
  const pairs = agreementPairs(rows, parameters.analyteKey, parameters.sessionRule)
  return {
    kind: 'agreement',
    ...measured(dataset, parameters.analyteKey),
    counts: pairs.counts,
    ...agreementFiguresOf(pairs, parameters),
  }
}

function measured({ manifest }: DatasetRecord, analyteKey: string) {
  const { name, unit } = frozenAnalyte(manifest, analyteKey, 'parameters.analyteKey')
  return { analyteName: name, unit }
}
