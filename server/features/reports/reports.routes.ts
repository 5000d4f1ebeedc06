import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { report, reportRequest } from '#shared/schemas/report.ts'
import { listFiles, listReports, type ReportRow } from './reports.reads.ts'
import { openReportPart, requestReport, tryReportAgain } from './reports.service.ts'
import { toReport } from './reports.view.ts'

const ofStudy = {
  path: '/api/studies/:studyId/reports',
  params: z.object({ studyId: id }),
  of: ({ studyId }: { studyId: string }) => ({ studyId }),
} as const

const ofReport = {
  params: z.object({ reportId: id }),
  of: ({ reportId }: { reportId: string }) => ({ reportId }),
} as const

export const reportRoutes = [
  route({
    ...ofStudy,
    method: 'get',
    action: 'report.list',
    returns: z.array(report),
    handle: async ({ params }) => withFiles(await listReports(reader(), params.studyId)),
  }),
  route({
    ...ofStudy,
    method: 'post',
    status: 202,
    action: 'report.issue',
    body: reportRequest,
    returns: report,
    handle: async ({ actor, params, body }) =>
      withFile(await requestReport(actor, params.studyId, body)),
  }),
  route({
    ...ofReport,
    method: 'post',
    path: '/api/reports/:reportId/try-again',
    status: 202,
    action: 'report.issue',
    returns: report,
    handle: async ({ actor, params }) => withFile(await tryReportAgain(actor, params.reportId)),
  }),
  route({
    ...ofReport,
    method: 'get',
    path: '/api/reports/:reportId/open.pdf',
    action: 'report.readOpen',
    handle: ({ actor, params }) => openReportPart(actor, params.reportId, 'open'),
  }),
  route({
    ...ofReport,
    method: 'get',
    path: '/api/reports/:reportId/closed.pdf',
    action: 'report.readClosed',
    handle: ({ actor, params }) => openReportPart(actor, params.reportId, 'closed'),
  }),
]

async function withFiles(rows: ReportRow[]) {
  const files = await listFiles(
    reader(),
    rows.map((row) => row.id),
  )
  return rows.map((row) => toReport(row, files))
}

const withFile = async (row: ReportRow) => toReport(row, await listFiles(reader(), [row.id]))
