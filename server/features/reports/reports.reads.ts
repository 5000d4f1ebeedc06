import { and, asc, count, desc, eq, inArray, lte, max, sql } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { datasets } from '#db/schema/datasets.ts'
import { jobs } from '#db/schema/jobs.ts'
import { people } from '#db/schema/people.ts'
import { reportFiles } from '#db/schema/reportFiles.ts'
import { reports } from '#db/schema/reports.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { ReportPart } from '#shared/terms/reportState.ts'

const columns = {
  id: reports.id,
  studyId: reports.studyId,
  number: reports.number,
  state: reports.state,
  title: reports.title,
  datasetId: reports.datasetId,
  datasetHash: datasets.hash,
  analysisIds: reports.analysisIds,
  issuedById: reports.issuedBy,
  issuedByName: people.name,
  issuedAt: reports.issuedAt,
  jobId: reports.jobId,
  jobState: jobs.state,
  failure: jobs.failure,
  version: reports.version,
}

const reportRows = (read: Reader) =>
  read
    .select(columns)
    .from(reports)
    .innerJoin(datasets, eq(datasets.id, reports.datasetId))
    .leftJoin(people, eq(people.id, reports.issuedBy))
    .leftJoin(jobs, eq(jobs.id, reports.jobId))

export type ReportRow = Awaited<ReturnType<typeof getReport>>

/** One report. @throws AppError not-found */
export async function getReport(read: Reader, reportId: string) {
  const [row] = await reportRows(read).where(eq(reports.id, reportId))
  if (!row) throw new AppError('not-found')
  return row
}

/** The reports of a study, the newest first. */
export const listReports = (read: Reader, studyId: string) =>
  reportRows(read).where(eq(reports.studyId, studyId)).orderBy(desc(reports.number))

const fileColumns = {
  reportId: reportFiles.reportId,
  part: reportFiles.part,
  pages: reportFiles.pages,
  sha256: reportFiles.sha256,
  bytes: sql<number>`length(${reportFiles.bytes})`.mapWith(Number),
  storedAt: reportFiles.storedAt,
}
export type ReportFileRow = Awaited<ReturnType<typeof listFiles>>[number]

/** The parts that are there of these reports, without their bytes; the open part first. */
export async function listFiles(read: Reader, reportIds: readonly string[]) {
  return reportIds.length === 0
    ? []
    : read
        .select(fileColumns)
        .from(reportFiles)
        .where(inArray(reportFiles.reportId, [...reportIds]))
        .orderBy(asc(reportFiles.part))
}

/** A part with its bytes. @throws AppError not-in-this-state while there is none */
export async function getFile(read: Reader, reportId: string, part: ReportPart) {
  const [row] = await read
    .select()
    .from(reportFiles)
    .where(and(eq(reportFiles.reportId, reportId), eq(reportFiles.part, part)))
  if (!row)
    throw new AppError('not-in-this-state', { message: 'This report has not been written yet.' })
  return row
}

/** The number that the next report of a study gets. */
export async function nextReportNumber(read: Reader, studyId: string): Promise<number> {
  const [row] = await read
    .select({ last: max(reports.number) })
    .from(reports)
    .where(eq(reports.studyId, studyId))
  return (row?.last ?? 0) + 1
}

/** Stored analyses of a dataset with whoever ran them, by number. Class: linked. */
export const analysesOfDataset = (read: Reader, datasetId: string, ids: readonly string[]) =>
  read
    .select({ analysis: analyses, runByName: people.name })
    .from(analyses)
    .leftJoin(people, eq(people.id, analyses.runBy))
    .where(and(eq(analyses.datasetId, datasetId), inArray(analyses.id, [...ids])))
    .orderBy(asc(analyses.number))

/** How many analyses had been run on a dataset by then. */
export async function analysesRunUntil(
  read: Reader,
  datasetId: string,
  until: Date,
): Promise<number> {
  const [row] = await read
    .select({ run: count() })
    .from(analyses)
    .where(and(eq(analyses.datasetId, datasetId), lte(analyses.runAt, until)))
  return row?.run ?? 0
}
