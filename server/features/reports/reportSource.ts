import { and, asc, eq, lte } from 'drizzle-orm'
import { alias } from 'drizzle-orm/mysql-core'
import type { Reader } from '#db/client.ts'
import { imports } from '#db/schema/imports.ts'
import { locks } from '#db/schema/locks.ts'
import { people } from '#db/schema/people.ts'
import { signatures } from '#db/schema/signatures.ts'
import { getDataset, readDatasetRows } from '#server/features/datasets/datasets.reads.ts'
import { listSites } from '#server/features/sites/sites.reads.ts'
import { getStudy } from '#server/features/studies/studies.reads.ts'
import { analysisResult } from '#shared/schemas/analysis.ts'
import { analysesOfDataset, analysesRunUntil, getReport } from './reports.reads.ts'

const decider = alias(people, 'decider')

export type ReportSource = Awaited<ReturnType<typeof readReportSource>>
export type StoredAnalysis = ReportSource['analyses'][number]

/**
 * Everything that a report prints, as it stood when the report was asked for, so that the same report
 * can be written again. Class: linked.
 * @throws AppError not-found
 */
export async function readReportSource(read: Reader, reportId: string) {
  const report = await getReport(read, reportId)
  const { studyId, datasetId, issuedAt } = report
  const [study, dataset, sites] = await Promise.all([
    getStudy(read, studyId),
    getDataset(read, datasetId),
    listSites(read, studyId),
  ])
  const chosen = await analysesOfDataset(read, datasetId, report.analysisIds)
  return {
    report,
    study,
    dataset,
    sites,
    rows: await readDatasetRows(read, datasetId),
    analyses: chosen.map(({ analysis, runByName }) => ({
      ...analysis,
      runByName: runByName ?? '',
      result: analysisResult.parse(JSON.parse(analysis.result)),
    })),
    /** Of so many analyses run on this dataset the report shows its chosen ones. */
    analysesRun: await analysesRunUntil(read, datasetId, issuedAt),
    imports: await importsUntil(read, studyId, issuedAt),
    locks: await locksUntil(read, studyId, issuedAt),
  }
}

const importsUntil = (read: Reader, studyId: string, until: Date) =>
  read
    .select({
      number: imports.number,
      state: imports.state,
      fileHash: imports.fileHash,
      counts: imports.counts,
      enteredAt: imports.enteredAt,
      uploadedByName: people.name,
    })
    .from(imports)
    .leftJoin(people, eq(people.id, imports.uploadedBy))
    .where(and(eq(imports.studyId, studyId), lte(imports.createdAt, until)))
    .orderBy(asc(imports.number))

const locksUntil = (read: Reader, studyId: string, until: Date) =>
  read
    .select({
      number: locks.number,
      kind: locks.kind,
      state: locks.state,
      requestedAt: locks.requestedAt,
      requestedByName: people.name,
      decidedAt: locks.decidedAt,
      decidedByName: decider.name,
      signedMeaning: signatures.meaning,
      signedBy: signatures.printedName,
      signedAt: signatures.signedAt,
    })
    .from(locks)
    .leftJoin(people, eq(people.id, locks.requestedBy))
    .leftJoin(decider, eq(decider.id, locks.decidedBy))
    .leftJoin(signatures, eq(signatures.id, locks.signatureId))
    .where(and(eq(locks.studyId, studyId), lte(locks.requestedAt, until)))
    .orderBy(asc(locks.number))
