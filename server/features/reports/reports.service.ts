import { reader } from '#db/client.ts'
import { reports } from '#db/schema/reports.ts'
import type { Actor } from '#server/changes/actor.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'
import { change } from '#server/changes/change.ts'
import { sha256Hex } from '#server/changes/hash.ts'
import { getDataset } from '#server/features/datasets/datasets.reads.ts'
import { getStudy, holdStudy } from '#server/features/studies/studies.reads.ts'
import type { FileAnswer } from '#server/http/route.ts'
import { enqueue } from '#server/jobs/queue.ts'
import { AppError, refuseField } from '#shared/errors/AppError.ts'
import type { ReportRequest } from '#shared/schemas/report.ts'
import type { ReportPart } from '#shared/terms/reportState.ts'
import {
  analysesOfDataset,
  getFile,
  getReport,
  nextReportNumber,
  type ReportRow,
} from './reports.reads.ts'
import { standing } from './reports.view.ts'

const QUEUED = 'Waiting for its turn'

/** Asks for a report on stored analyses of one dataset; a job writes it. */
export async function requestReport(
  actor: Actor,
  studyId: string,
  { id, title, datasetId, analysisIds }: ReportRequest,
): Promise<ReportRow> {
  await change({ actor, action: 'report.issue', of: { studyId } }, async (tx) => {
    await requireDataset(tx, datasetId)
    const found = await analysesOfDataset(tx.read, datasetId, analysisIds)
    if (found.length !== analysisIds.length)
      refuseField('analysisIds', 'A report shows stored analyses of its own dataset alone.')
    await holdStudy(tx.read, studyId)
    await tx.insert(reports, {
      id,
      studyId,
      createdAt: tx.at,
      number: await nextReportNumber(tx.read, studyId),
      state: 'preparing',
      title,
      datasetId,
      analysisIds,
      issuedBy: actor.personId,
      issuedAt: tx.at,
      jobId: await enqueueWriting(tx, actor, id),
    })
  })
  return getReport(reader(), id)
}

/** Asks again for a report that could not be written, as of now. */
export async function tryReportAgain(actor: Actor, reportId: string): Promise<ReportRow> {
  const reason = 'Asked for again, because it could not be written.'
  await change({ actor, action: 'report.issue', of: { reportId }, reason }, async (tx) => {
    const report = await getReport(tx.read, reportId)
    if (standing(report) !== 'failed')
      throw new AppError('not-in-this-state', {
        message: 'Only a report that could not be written can be tried again.',
      })
    const again = {
      state: 'preparing' as const,
      issuedAt: tx.at,
      jobId: await enqueueWriting(tx, actor, reportId),
    }
    await tx.update(reports, reportId, again, report.version)
  })
  return getReport(reader(), reportId)
}

const READING = { open: 'report.readOpen', closed: 'report.readClosed' } as const

/** One part as a file; that it was opened goes on record. */
export async function openReportPart(
  actor: Actor,
  reportId: string,
  part: ReportPart,
): Promise<FileAnswer> {
  return change({ actor, action: READING[part], of: { reportId } }, async (tx) => {
    const report = await getReport(tx.read, reportId)
    const { bytes, sha256 } = await getFile(tx.read, reportId, part)
    if (sha256Hex(bytes) !== sha256)
      throw new Error(`The ${part} part of report ${reportId} is not what was stored.`)
    const study = await getStudy(tx.read, tx.allowed.studyId)
    tx.note({ recordType: 'report', recordId: reportId, recordLabel: `no. ${report.number}` })
    return {
      bytes,
      type: 'application/pdf',
      name: `${study.code}-report-${report.number}-${part}-part.pdf`,
      inline: true,
    }
  })
}

/** A dataset of another study is as if it did not exist. */
async function requireDataset(tx: ChangeTx, datasetId: string): Promise<void> {
  const dataset = await getDataset(tx.read, datasetId).catch((error: unknown) => {
    if (error instanceof AppError && error.code === 'not-found') return undefined
    throw error
  })
  if (dataset?.studyId !== tx.allowed.studyId)
    refuseField('datasetId', 'There is no such dataset in this study.')
}

const enqueueWriting = (tx: ChangeTx, actor: Actor, reportId: string) =>
  enqueue(tx, actor, { kind: 'report.write', recordId: reportId, words: QUEUED })
