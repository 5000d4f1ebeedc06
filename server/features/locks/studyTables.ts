import { createHash } from 'node:crypto'
import { setImmediate as letOthersRun } from 'node:timers/promises'
import { and, asc, eq, getTableName, gt } from 'drizzle-orm'
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

const TABLES = {
  sites,
  analytes,
  protocolVersions,
  subjects,
  sessions,
  sessionValues,
  referenceMeasurements,
  referenceOutcomes,
} as const
type StudyTable = (typeof TABLES)[keyof typeof TABLES]
export type StudyTables = { [K in keyof typeof TABLES]: (typeof TABLES)[K]['$inferSelect'][] }

/** Every table that holds a study's data, with all records of the study in order of key. */
export async function readStudyTables(read: Reader, studyId: string): Promise<StudyTables> {
  const found: Partial<Record<keyof StudyTables, unknown[]>> = {}
  for (const [key, table] of Object.entries(TABLES) as [keyof StudyTables, StudyTable][])
    found[key] = await recordsOf(read, table, studyId)
  return found as StudyTables
}

/** Piece by piece: thousands of records parsed at once would hold other requests up. */
async function recordsOf(read: Reader, table: StudyTable, studyId: string) {
  const records: { id: string }[] = []
  for (let last = ''; ; last = records.at(-1)!.id) {
    const piece = await read
      .select()
      .from(table)
      .where(and(eq(table.studyId, studyId), gt(table.id, last)))
      .orderBy(asc(table.id))
      .limit(AT_A_STRETCH)
    for (const record of piece) records.push(record)
    if (piece.length < AT_A_STRETCH) return records
  }
}

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
