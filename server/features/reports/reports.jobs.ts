import { reader } from '#db/client.ts'
import { reportFiles } from '#db/schema/reportFiles.ts'
import { reports } from '#db/schema/reports.ts'
import { change } from '#server/changes/change.ts'
import { sha256Hex } from '#server/changes/hash.ts'
import type { JobContext, JobHandler } from '#server/jobs/runner.ts'
import { writeLetters } from '#server/mail/outbox.ts'
import { renderPdf } from '#server/reports/renderPdf.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { REPORT_PARTS } from '#shared/terms/reportState.ts'
import { pageCount } from './pageCount.ts'
import { closedPart } from './parts/closedPart.ts'
import { openPart } from './parts/openPart.ts'
import { reportLetters } from './reportLetters.ts'
import { type ReportSource, readReportSource } from './reportSource.ts'
import { getReport } from './reports.reads.ts'

const STEPS = 4

/** Writes both parts of a report, stores them with their hashes and tells their readers. */
export const reportWriting: JobHandler = {
  run: async (context) => {
    const { recordId: reportId } = context.job
    // A worker that was cut off after it had stored the report leaves nothing to do.
    if ((await getReport(reader(), reportId)).state !== 'preparing') return
    await context.progress(0, STEPS, 'Reading the dataset')
    const source = await readReportSource(reader(), reportId)
    await context.progress(1, STEPS, 'Writing the open part')
    const open = await renderPdf(openPart(source))
    await context.progress(2, STEPS, 'Drawing the figures of the closed part')
    const closed = await renderPdf(closedPart(source))
    await context.progress(3, STEPS, 'Storing both parts')
    await storeReport(context, source, { open, closed })
  },

  ended: async ({ actor, job }, _end, words) => {
    const of = { reportId: job.recordId }
    try {
      await change({ actor, action: 'report.fail', of, reason: words.slice(0, 500) }, (tx) =>
        tx.update(reports, job.recordId, { state: 'failed' }),
      )
    } catch (error) {
      // Whoever asked may have left the team meanwhile; the job's own end then stands for the report's.
      if (!(error instanceof AppError)) throw error
    }
  },
}

async function storeReport(
  { actor }: JobContext,
  { report, study }: ReportSource,
  parts: { open: Buffer; closed: Buffer },
): Promise<void> {
  const of = { reportId: report.id }
  const reason = 'Both parts have been written.'
  const pages = { open: pageCount(parts.open), closed: pageCount(parts.closed) }
  await change({ actor, action: 'report.store', of, reason }, async (tx) => {
    for (const part of REPORT_PARTS)
      await tx.insert(reportFiles, {
        reportId: report.id,
        studyId: study.id,
        part,
        pages: pages[part],
        sha256: sha256Hex(parts[part]),
        bytes: parts[part],
        storedAt: tx.at,
      })
    await tx.update(reports, report.id, { state: 'issued' })
    await writeLetters(tx, await reportLetters(tx.read, study, { number: report.number, pages }))
  })
}
