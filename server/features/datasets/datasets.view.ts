import type { Dataset, DatasetSummary } from '#shared/schemas/dataset.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import type { DatasetRecord } from './datasets.reads.ts'

export const toDatasetSummary = (
  row: Omit<DatasetRecord, 'manifest' | 'protocol'>,
): DatasetSummary => ({ ...row, frozenAt: row.frozenAt.toISOString() })

export const toDataset = (row: DatasetRecord): Dataset => ({
  ...row,
  frozenAt: row.frozenAt.toISOString(),
  caution: CAUTIONS[row.protocol.regulatoryStatus],
})
