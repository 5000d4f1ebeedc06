import { createHash } from 'node:crypto'
import { setImmediate as letOthersRun } from 'node:timers/promises'
import { asc, eq, getTableName } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analytes } from '#db/schema/analytes.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { sites } from '#db/schema/sites.ts'
import { subjects } from '#db/schema/subjects.ts'
import { canonicalJson } from '#server/changes/hash.ts'

/** So many records are worked on at a stretch before other requests get their turn. */
export const AT_A_STRETCH = 1_000

/** Every table that holds a study's data, with all records of the study in order of key. */
export async function readStudyTables(read: Reader, studyId: string) {
  return {
    sites: await read.select().from(sites).where(eq(sites.studyId, studyId)).orderBy(asc(sites.id)),
    analytes: await read
      .select()
      .from(analytes)
      .where(eq(analytes.studyId, studyId))
      .orderBy(asc(analytes.id)),
    protocolVersions: await read
      .select()
      .from(protocolVersions)
      .where(eq(protocolVersions.studyId, studyId))
      .orderBy(asc(protocolVersions.id)),
    subjects: await read
      .select()
      .from(subjects)
      .where(eq(subjects.studyId, studyId))
      .orderBy(asc(subjects.id)),
    sessions: await read
      .select()
      .from(sessions)
      .where(eq(sessions.studyId, studyId))
      .orderBy(asc(sessions.id)),
    sessionValues: await read
      .select()
      .from(sessionValues)
      .where(eq(sessionValues.studyId, studyId))
      .orderBy(asc(sessionValues.id)),
    referenceMeasurements: await read
      .select()
      .from(referenceMeasurements)
      .where(eq(referenceMeasurements.studyId, studyId))
      .orderBy(asc(referenceMeasurements.id)),
    referenceOutcomes: await read
      .select()
      .from(referenceOutcomes)
      .where(eq(referenceOutcomes.studyId, studyId))
      .orderBy(asc(referenceOutcomes.id)),
  }
}
export type StudyTables = Awaited<ReturnType<typeof readStudyTables>>

const TABLES = {
  sites,
  analytes,
  protocolVersions,
  subjects,
  sessions,
  sessionValues,
  referenceMeasurements,
  referenceOutcomes,
} as const satisfies Record<keyof StudyTables, unknown>

/** For the manifest: each table's name, number of records and hash over their canonical forms. */
export async function hashStudyTables(tables: StudyTables) {
  const hashed: { name: string; records: number; hash: string }[] = []
  for (const [key, records] of Object.entries(tables) as [keyof StudyTables, unknown[]][])
    hashed.push({
      name: getTableName(TABLES[key]),
      records: records.length,
      hash: await hashLines(records.map((record) => () => canonicalJson(record))),
    })
  return hashed
}

/** SHA-256 over texts, each with a line feed after it. */
export async function hashLines(lines: readonly (() => string)[]): Promise<string> {
  const hash = createHash('sha256')
  for (const [at, line] of lines.entries()) {
    hash.update(`${line()}\n`)
    if (at % AT_A_STRETCH === AT_A_STRETCH - 1) await letOthersRun()
  }
  return hash.digest('hex')
}
