import { desc, eq, max, sql } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { datasets } from '#db/schema/datasets.ts'
import { locks } from '#db/schema/locks.ts'
import { people } from '#db/schema/people.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { AgreementScale } from '#shared/terms/agreementTerms.ts'

type Line = { estimate: number; lower: number | null; upper: number | null }

/** Picked out in the database, so that a list does not carry thousands of points of curves; comes parsed. */
const picked = <T>(path: string) => sql<T | null>`json_extract(${analyses.result}, ${path})`

const summary = {
  id: analyses.id,
  studyId: analyses.studyId,
  number: analyses.number,
  kind: analyses.kind,
  badge: analyses.badge,
  title: analyses.title,
  runAt: analyses.runAt,
  runByName: people.name,
  datasetId: analyses.datasetId,
  datasetHash: datasets.hash,
  protocol: protocolVersions.document,
  area: picked<Line>('$.area'),
  bias: picked<Line>('$.bias'),
  difference: picked<Line>('$.comparisons[0].difference'),
  sd: picked<number>('$.sd'),
  scale: picked<AgreementScale>('$.scale'),
  withinSubjectSd: picked<Line>('$.withinSubjectSd'),
  rankCorrelation: picked<Line>('$.rankCorrelation'),
  unit: picked<string>('$.unit'),
}

const whole = {
  ...summary,
  parameters: analyses.parameters,
  protocolVersion: analyses.protocolVersion,
  statisticsVersion: analyses.statisticsVersion,
  seed: analyses.seed,
  result: analyses.result,
  resultHash: analyses.resultHash,
  frozenAt: datasets.frozenAt,
  lockKind: locks.kind,
}

export type AnalysisSummaryRow = Awaited<ReturnType<typeof listAnalyses>>[number]
export type AnalysisRow = Awaited<ReturnType<typeof getAnalysis>>

/** A stored analysis with its result as it was written. @throws AppError not-found */
export async function getAnalysis(read: Reader, analysisId: string) {
  const [row] = await read
    .select(whole)
    .from(analyses)
    .innerJoin(datasets, eq(datasets.id, analyses.datasetId))
    .innerJoin(locks, eq(locks.id, datasets.lockId))
    .innerJoin(protocolVersions, eq(protocolVersions.id, datasets.protocolVersionId))
    .leftJoin(people, eq(people.id, analyses.runBy))
    .where(eq(analyses.id, analysisId))
  if (!row) throw new AppError('not-found')
  return row
}

/** The stored analyses of a study, the newest first. */
export const listAnalyses = (read: Reader, studyId: string) =>
  read
    .select(summary)
    .from(analyses)
    .innerJoin(datasets, eq(datasets.id, analyses.datasetId))
    .innerJoin(protocolVersions, eq(protocolVersions.id, datasets.protocolVersionId))
    .leftJoin(people, eq(people.id, analyses.runBy))
    .where(eq(analyses.studyId, studyId))
    .orderBy(desc(analyses.number))

/** The number that the next analysis of a study gets. */
export async function nextAnalysisNumber(read: Reader, studyId: string): Promise<number> {
  const [row] = await read
    .select({ last: max(analyses.number) })
    .from(analyses)
    .where(eq(analyses.studyId, studyId))
  return (row?.last ?? 0) + 1
}
