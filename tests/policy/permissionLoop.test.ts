import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { TARGET_KEYS } from '#server/changes/targets.ts'
import type { Route } from '#server/http/route.ts'
import { ROUTES } from '#server/routes.ts'
import {
  DUTIES_OF_ROLE,
  type Duty,
  type Role,
  SITE_DUTIES,
  type StudyKind,
} from '#shared/policy/people.ts'
import { type Grant, policyRow } from '#shared/policy/permissions.ts'
import { type Api, startApi, type TestPerson } from '../support/api.ts'
import { oneOfEach } from '../support/records.ts'

type Place = 'study' | 'own' | 'other'
type Line = { role: Role; duty: Duty | null; place: Place }

/** Every line that a team list can hold, seen from a record at the first site. */
const LINES: Line[] = (Object.keys(DUTIES_OF_ROLE) as Role[]).flatMap((role): Line[] => {
  const duties: (Duty | null)[] = role === 'analyst' ? [null] : [...DUTIES_OF_ROLE[role]]
  return duties.flatMap((duty): Line[] =>
    duty && SITE_DUTIES.includes(duty)
      ? [
          { role, duty, place: 'own' },
          { role, duty, place: 'other' },
        ]
      : [{ role, duty, place: 'study' }],
  )
})

const KINDS: StudyKind[] = ['prospective', 'earlierData']
const SITE_BOUND = ['siteId', 'subjectId']

/** What the table promises, written a second time and without the product's own judge. */
function promised(
  route: Route,
  target: string,
  line: Line,
  kind: StudyKind,
  locked: boolean,
): number | 'reached' {
  const row = policyRow(route.action)
  if (SITE_BOUND.includes(target) && line.place === 'other') return 404
  if (row.onlyKind && row.onlyKind !== kind) return 409
  const granted = (grant: Grant) => {
    if (grant.role !== line.role) return false
    if (grant.afterRelease && kind === 'prospective') return false
    if (grant.scope === 'self') return target !== 'jobId'
    if (kind === 'prospective' && grant.duty !== line.duty) return false
    if (grant.scope === 'study') return line.place === 'study'
    // Own site: a coordinator of another site still reads what belongs to the whole study.
    if (SITE_BOUND.includes(target))
      return line.place === 'own' || (kind === 'earlierData' && line.place === 'study')
    return line.place === 'study' ? kind === 'earlierData' : row.effect !== 'write'
  }
  if (!row.grants.some(granted)) return target === 'jobId' ? 404 : 403
  return row.effect === 'write' && row.whenLocked === 'refuse' && locked ? 423 : 'reached'
}

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const studyRoutes = ROUTES.filter((route) => route.of)
const installationRoutes = ROUTES.filter((route) => !route.of)

/** The key of the record that a route is about, as the route itself says. */
function targetOf(route: Route): string {
  const names = Object.fromEntries(
    [...route.path.matchAll(/:(\w+)/g)].map((match) => [match[1]!, match[1]!]),
  )
  return Object.keys(route.of!(names))[0]!
}

describe('every route × role and duty × own or other site × open or locked × kind of study', () => {
  let tried = 0
  afterAll(() =>
    console.info(`permission loop: ${tried} combinations over ${studyRoutes.length} routes`),
  )

  test('every route with a record names one that the product can find', () => {
    expect(
      studyRoutes.map(targetOf).filter((key) => !(TARGET_KEYS as string[]).includes(key)),
    ).toEqual([])
  })

  for (const kind of KINDS)
    for (const locked of [false, true])
      test(`in ${kind}, ${locked ? 'locked' : 'open'}, each answers what the table says`, async () => {
        const wrong: string[] = []
        for (const line of LINES) {
          const study = await api.given.study({ kind })
          const site = { study: null, own: study.north, other: study.south }[line.place]
          const who = await api.given.member(study, { ...line, site })
          const keys = await oneOfEach(api.fixtures, api.given, study, study.id)
          if (locked) await api.given.lock(study)
          for (const route of studyRoutes) {
            const status = await ask(route, keys, who)
            const promise = promised(route, targetOf(route), line, kind, locked)
            tried += 1
            const kept = promise === 'reached' ? reached(status) : status === promise
            if (!kept)
              wrong.push(
                `${route.method} ${route.path} as ${line.role} ${line.duty} ${line.place}: ${status}, promised ${promise}`,
              )
          }
        }
        expect(wrong).toEqual([])
      })

  test('outside the team every record is as if it did not exist, whatever the role', async () => {
    const study = await api.given.study()
    const keys = await oneOfEach(api.fixtures, api.given, study, study.id)
    const stranger = await api.given.person()
    for (const route of studyRoutes)
      expect([route.path, await ask(route, keys, stranger)]).toEqual([route.path, 404])
  })

  test('without a login every route answers 401', async () => {
    const study = await api.given.study()
    const keys = await oneOfEach(api.fixtures, api.given, study, study.id)
    for (const route of ROUTES)
      expect([route.path, await ask(route, keys, null)]).toEqual([route.path, 401])
  })

  test('a line that has ended opens nothing', async () => {
    const study = await api.given.study()
    const keys = await oneOfEach(api.fixtures, api.given, study, study.id)
    const line = await api.given.memberLine(study, { role: 'coordinator', duty: 'studyLead' })
    await api.given.endLine(line)
    for (const route of studyRoutes)
      expect([route.path, await ask(route, keys, line.person)]).toEqual([route.path, 404])
  })

  test('a line opens nothing once the identity provider no longer vouches for its role', async () => {
    const study = await api.given.study()
    const keys = await oneOfEach(api.fixtures, api.given, study, study.id)
    const person = await api.given.person({ roles: ['analyst'] })
    await api.given.member(study, { role: 'coordinator', duty: 'studyLead', person })
    for (const route of studyRoutes)
      expect([route.path, await ask(route, keys, person)]).toEqual([route.path, 404])
  })

  test('routes outside any study hang on the role that the identity provider vouches for', async () => {
    for (const role of Object.keys(DUTIES_OF_ROLE) as Role[]) {
      const who = await api.given.person({ roles: [role] })
      for (const route of installationRoutes) {
        const allowed = policyRow(route.action).grants.some((grant) => grant.role === role)
        const status = await ask(route, {}, who)
        expect([route.path, role, allowed ? reached(status) : status]).toEqual([
          route.path,
          role,
          allowed ? true : 403,
        ])
      }
    }
  })
})

/** Through the gate: whatever is wrong after it is wrong with an empty request. */
const reached = (status: number) => status < 500 && ![401, 403, 404, 423].includes(status)

async function ask(
  route: Route,
  keys: Record<string, string>,
  who: TestPerson | null,
): Promise<number> {
  const path = route.path.replace(/:(\w+)/g, (_all, name: string) => keys[name] ?? name)
  const sender = who ? api.as(who) : api.nobody
  const request = sender[route.method](path)
  const response = await (route.method === 'get' || route.uploadBytes ? request : request.send({}))
  return response.status
}
