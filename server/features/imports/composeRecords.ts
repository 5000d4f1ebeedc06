import { newId } from '#db/id.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { CompoundRecord } from '#server/changes/ChangeTx.ts'
import type { ImportEntry } from '#shared/schemas/import.ts'
import type { Additions } from './compareStored.ts'
import type { StoredSubject } from './storedSubjects.ts'

/** A row that is to be entered; `adds` says what is new where the subject is here already. */
export type EnteringRow = {
  line: number
  entry: ImportEntry
  stored: { subject: StoredSubject; adds: Additions } | null
}

export type Composing = {
  studyId: string
  importId: string
  importNumber: number
  at: Date
  analyteIds: ReadonlyMap<string, string>
  digestOf: (subjectWord: string) => string
  /** A code at a site that was never given before. */
  newCode: (siteId: string) => string
}

type Rows = CompoundRecord['rows']

/** Turns rows into records, one compound record a row, and says which subject code each line got. */
export function composeRecords(rows: readonly EnteringRow[], composing: Composing) {
  const { studyId, at, importNumber } = composing
  const merged = mergedSubjects(rows)
  const given = new Map<string, { id: string; code: string; outcome: boolean }>()
  const codes = new Map<number, string>()
  const records = rows.map(({ line, entry, stored }): CompoundRecord => {
    const base = { studyId, siteId: entry.siteId, version: 1, createdAt: at }
    const parts: Rows = []
    let subject = stored
      ? {
          id: stored.subject.id,
          code: stored.subject.code,
          outcome: stored.subject.outcome !== null,
        }
      : undefined
    const known = given.get(entry.subjectWord)
    if (known) subject = known
    if (!subject) {
      subject = { id: newId(), code: composing.newCode(entry.siteId), outcome: false }
      parts.push([subjects, subjectRow(subject, merged.get(entry.subjectWord)!, base, composing)])
    }
    given.set(entry.subjectWord, subject)
    codes.set(line, subject.code)

    const here = stored?.subject.sessions.get(entry.sessionNumber)
    const sessionId = here?.id ?? newId()
    if (!here)
      parts.push([
        sessions,
        {
          ...base,
          id: sessionId,
          subjectId: subject.id,
          number: entry.sessionNumber,
          startedAt: null,
        },
      ])
    parts.push(...valueRows(stored?.adds ?? entry, sessionId, base, composing.analyteIds))
    if (entry.outcome !== null && !subject.outcome) {
      subject.outcome = true
      parts.push([
        referenceOutcomes,
        { ...base, id: newId(), subjectId: subject.id, outcome: entry.outcome, reason: null },
      ])
    }
    return {
      recordType: 'importRow',
      recordId: newId(),
      recordLabel: `import ${importNumber}, line ${line}`,
      recordSiteId: entry.siteId,
      rows: parts,
    }
  })
  return { records, codes, subjects: given.size }
}

type Base = { studyId: string; siteId: string; version: number; createdAt: Date }

const subjectRow = (
  { id, code }: { id: string; code: string },
  entry: ImportEntry,
  base: Base,
  { importId, at, digestOf }: Composing,
) => ({
  ...base,
  id,
  code,
  sex: entry.sex,
  ageBand: entry.ageBand,
  covariates: entry.covariates,
  enrolledAt: at,
  importId,
  sourceDigest: digestOf(entry.subjectWord),
})

function valueRows(
  { sensorValues, referenceValues }: Pick<ImportEntry, 'sensorValues' | 'referenceValues'>,
  sessionId: string,
  base: Base,
  analyteIds: ReadonlyMap<string, string>,
): Rows {
  return [
    ...Object.entries(sensorValues).map(([key, { value, belowLod }]): Rows[number] => [
      sessionValues,
      { ...base, id: newId(), sessionId, analyteId: analyteIds.get(key)!, value, belowLod },
      `sessionValue ${key}`,
    ]),
    ...Object.entries(referenceValues).map(([key, value]): Rows[number] => [
      referenceMeasurements,
      { ...base, id: newId(), sessionId, analyteId: analyteIds.get(key)!, value },
      `referenceMeasurement ${key}`,
    ]),
  ]
}

/** What all rows of a subject say about it: one may hold what another leaves blank. */
function mergedSubjects(rows: readonly EnteringRow[]): Map<string, ImportEntry> {
  const merged = new Map<string, ImportEntry>()
  for (const { entry } of rows) {
    const before = merged.get(entry.subjectWord)
    merged.set(
      entry.subjectWord,
      before
        ? {
            ...before,
            sex: before.sex ?? entry.sex,
            ageBand: before.ageBand ?? entry.ageBand,
            covariates: { ...entry.covariates, ...before.covariates },
          }
        : entry,
    )
  }
  return merged
}
