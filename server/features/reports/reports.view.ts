import type { Report } from '#shared/schemas/report.ts'
import type { ReportState } from '#shared/terms/reportState.ts'
import type { ReportFileRow, ReportRow } from './reports.reads.ts'

const OVER = ['failed', 'cancelled']

/** A report as it goes out, with the parts that are there. */
export function toReport(row: ReportRow, files: readonly ReportFileRow[]): Report {
  const state = standing(row)
  return {
    id: row.id,
    number: row.number,
    state,
    title: row.title,
    datasetHash: row.datasetHash,
    analysisCount: row.analysisIds.length,
    issuedById: row.issuedById,
    issuedByName: row.issuedByName ?? '',
    issuedAt: row.issuedAt.toISOString(),
    jobId: state === 'preparing' ? row.jobId : null,
    failure: state === 'failed' ? row.failure : null,
    files: files
      .filter((file) => file.reportId === row.id)
      .map((file) => ({ ...file, storedAt: file.storedAt.toISOString() })),
  }
}

/** A report whose job ended without it has failed, even where the job could not say so itself. */
export const standing = (row: Pick<ReportRow, 'state' | 'jobState'>): ReportState =>
  row.state === 'preparing' && OVER.includes(row.jobState ?? '') ? 'failed' : row.state
