import { randomUUID } from 'node:crypto'
import type { Database } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { datasets } from '#db/schema/datasets.ts'
import { imports } from '#db/schema/imports.ts'
import { jobs } from '#db/schema/jobs.ts'
import { locks } from '#db/schema/locks.ts'
import { reports } from '#db/schema/reports.ts'
import type { Of, TargetKey } from '#server/changes/targets.ts'
import type { AnalysisResult } from '#shared/schemas/analysis.ts'
import type { makers } from './makers.ts'

type Given = ReturnType<typeof makers>

/** The result of an analysis of nobody. */
const noResult: AnalysisResult = {
  kind: 'accuracy',
  analyteName: 'Ammonia',
  unit: '[ppb]',
  counts: {
    subjects: 0,
    present: 0,
    absent: 0,
    values: 0,
    severalSessions: 0,
    belowLod: 0,
    leftOut: [],
  },
  area: null,
  areaWithheld: 'Nobody is in it.',
  curve: { thresholds: [], truePositives: [], falsePositives: [] },
  rules: [],
  plannedCutOff: null,
  atCutOff: null,
}

/**
 * One record of every kind that a route may be about, in one study, at its first site. Empty of
 * data: the permission loop asks who may reach a record, not what stands in it.
 */
export async function oneOfEach(
  database: Database,
  given: Given,
  study: Awaited<ReturnType<Given['study']>>,
  startedBy: string,
): Promise<Required<Of>> {
  const base = { studyId: study.id, version: 1, createdAt: new Date() }
  const key = () => randomUUID()
  const hash = '0'.repeat(64)
  const subject = await given.subject(study, study.north)
  const made: Record<
    Exclude<TargetKey, 'studyId' | 'siteId' | 'subjectId' | 'memberId'>,
    string
  > = {
    importId: key(),
    lockId: key(),
    datasetId: key(),
    analysisId: key(),
    reportId: key(),
    jobId: key(),
  }
  await database.insert(imports).values({
    ...base,
    id: made.importId,
    number: 1,
    state: 'uploaded',
    fileHash: hash,
    fileBytes: 0,
    uploadedBy: key(),
  })
  await database.insert(locks).values({
    ...base,
    id: made.lockId,
    number: 1,
    kind: 'final',
    state: 'requested',
    requestedBy: key(),
    requestedAt: base.createdAt,
  })
  await database.insert(datasets).values({
    ...base,
    id: made.datasetId,
    lockId: made.lockId,
    frozenAt: base.createdAt,
    protocolVersionId: study.protocolVersionId,
    subjectCount: 0,
    rowCount: 0,
    hash,
    manifest: {
      study: study.code,
      lockKind: 'final',
      frozenAt: base.createdAt.toISOString(),
      protocolVersion: 1,
      protocolHash: hash,
      analytes: [],
      subjectCount: 0,
      rowCount: 0,
      rowsHash: hash,
      tables: [],
      auditCount: 0,
      auditHeadHash: hash,
    },
    auditCount: 0,
    auditHeadHash: hash,
  })
  await database.insert(analyses).values({
    ...base,
    id: made.analysisId,
    datasetId: made.datasetId,
    number: 1,
    kind: 'accuracy',
    badge: 'exploratory',
    title: 'Invented analysis',
    parameters: {
      kind: 'accuracy',
      analyteKey: 'ammonia',
      direction: 'higher',
      sessionRule: 'first',
      cutOff: null,
      confidence: 0.95,
      prevalence: null,
      areaInterval: 'delong',
      resampling: null,
      partialArea: null,
      troubledResults: null,
      subgroups: [],
      floors: null,
    },
    protocolVersion: 1,
    statisticsVersion: '0',
    seed: 1,
    result: JSON.stringify(noResult),
    resultHash: hash,
    runBy: key(),
    runAt: base.createdAt,
  })
  await database.insert(reports).values({
    ...base,
    id: made.reportId,
    number: 1,
    state: 'preparing',
    title: 'Invented report',
    datasetId: made.datasetId,
    analysisIds: [made.analysisId],
    issuedBy: key(),
    issuedAt: base.createdAt,
  })
  await database.insert(jobs).values({
    id: made.jobId,
    studyId: study.id,
    kind: 'report.write',
    state: 'done',
    recordId: made.reportId,
    payload: {},
    startedBy,
    queuedAt: base.createdAt,
  })
  const member = await given.memberLine(study, {
    role: 'coordinator',
    duty: 'bedside',
    site: study.north,
  })
  return {
    ...made,
    studyId: study.id,
    siteId: study.north.id,
    subjectId: subject.id,
    memberId: member.id,
  }
}
