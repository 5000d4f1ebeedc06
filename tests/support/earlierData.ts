import { randomUUID } from 'node:crypto'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { signingGrants } from '#db/schema/signingGrants.ts'
import { subjects } from '#db/schema/subjects.ts'
import { sha256Hex } from '#server/changes/hash.ts'
import type { Outcome } from '#shared/terms/outcome.ts'
import { subjectCode } from '#shared/terms/subjectCode.ts'
import { type Api, aKey, type TestPerson } from './api.ts'

type Study = Awaited<ReturnType<Api['given']['study']>>
type Reading = number | { value: number; belowLod: boolean }
export type GivenSubject = {
  outcome?: Outcome | null
  site?: 'north' | 'south'
  sex?: 'F' | 'M'
  covariates?: Record<string, string | number>
  sessions?: { sensor?: Record<string, Reading>; reference?: Record<string, number> }[]
}

const ROWS_AT_A_TIME = 2_000
const FIVE_MINUTES_MS = 300_000

/** Fills a study with subjects, their sessions, values and outcomes, as imports would have. */
export async function fillStudy(api: Api, study: Study, given: GivenSubject[]): Promise<string[]> {
  const createdAt = new Date()
  const base = () => ({ id: randomUUID(), studyId: study.id, version: 1, createdAt })
  const analyteId = (key: string) => (key === 'acetone' ? study.acetone.id : study.ammonia.id)
  const codesOf = { north: codesFor(study.north.prefix), south: codesFor(study.south.prefix) }
  const codes: string[] = []
  const rows = {
    subjects: [] as (typeof subjects.$inferInsert)[],
    sessions: [] as (typeof sessions.$inferInsert)[],
    values: [] as (typeof sessionValues.$inferInsert)[],
    references: [] as (typeof referenceMeasurements.$inferInsert)[],
    outcomes: [] as (typeof referenceOutcomes.$inferInsert)[],
  }
  for (const each of given) {
    const { site = 'north', sex = 'F', covariates = {} } = each
    const siteId = study[site].id
    const code = codesOf[site].next().value!
    codes.push(code)
    const subject = { ...base(), siteId, code, sex }
    rows.subjects.push({ ...subject, ageBand: '50-54', enrolledAt: createdAt, covariates })
    if (each.outcome)
      rows.outcomes.push({ ...base(), siteId, subjectId: subject.id, outcome: each.outcome })
    for (const [number, { sensor = {}, reference = {} }] of (each.sessions ?? []).entries()) {
      const session = { ...base(), siteId, subjectId: subject.id, number: number + 1 }
      rows.sessions.push(session)
      const link = (key: string) => ({
        ...base(),
        siteId,
        sessionId: session.id,
        analyteId: analyteId(key),
      })
      for (const [key, reading] of Object.entries(sensor))
        rows.values.push({
          ...link(key),
          ...(typeof reading === 'number' ? { value: reading, belowLod: false } : reading),
        })
      for (const [key, value] of Object.entries(reference))
        rows.references.push({ ...link(key), value })
    }
  }
  const tables = [
    [subjects, rows.subjects],
    [sessions, rows.sessions],
    [sessionValues, rows.values],
    [referenceMeasurements, rows.references],
    [referenceOutcomes, rows.outcomes],
  ] as const
  for (const [table, all] of tables)
    for (let from = 0; from < all.length; from += ROWS_AT_A_TIME)
      await api.fixtures.insert(table).values(all.slice(from, from + ROWS_AT_A_TIME) as never[])
  return codes
}

function* codesFor(prefix: string): Generator<string, undefined> {
  for (let number = 10_000; ; number += 1) {
    const code = subjectCode(prefix, String(number))
    if (code) yield code
  }
}

/** A study lead, an oversight monitor and an analyst of the study. */
export async function teamOf(api: Api, study: Study) {
  return {
    lead: await api.given.member(study, { role: 'coordinator', duty: 'studyLead' }),
    monitor: await api.given.member(study, { role: 'monitor', duty: 'oversight' }),
    analyst: await api.given.member(study, { role: 'analyst' }),
  }
}

/** What coming back from the identity provider with a fresh authentication leaves behind. */
export async function authenticatedAfresh(
  api: Api,
  person: TestPerson,
  purpose: string,
  options: { endsInMs?: number } = {},
): Promise<void> {
  await api.fixtures.insert(signingGrants).values({
    id: randomUUID(),
    personId: person.id,
    loginIdHash: sha256Hex(person.secret),
    purpose,
    authenticatedAt: new Date(),
    endsAt: new Date(Date.now() + (options.endsInMs ?? FIVE_MINUTES_MS)),
  })
}

/** Takes a study through request, fresh authentication and approval; answers the approved lock. */
export async function lockThroughHttp(
  api: Api,
  study: Study,
  team: { lead: TestPerson; monitor: TestPerson },
) {
  const asked = await api
    .as(team.lead)
    .post(`/api/studies/${study.id}/locks`)
    .send({ id: aKey() })
    .expect(201)
  await authenticatedAfresh(api, team.monitor, `lock.approve:${asked.body.id}`)
  const approved = await api
    .as(team.monitor)
    .post(`/api/locks/${asked.body.id}/approve`)
    .send({ reasonForChange: 'Checklist read', version: asked.body.version })
    .expect(200)
  return approved.body
}
