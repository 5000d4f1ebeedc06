import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { analytes } from '#db/schema/analytes.ts'
import { members } from '#db/schema/members.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sites } from '#db/schema/sites.ts'
import { studies } from '#db/schema/studies.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { isCasNumber } from '#shared/terms/casNumber.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { GAS_CATALOGUE } from '#shared/terms/gases.ts'
import { type Api, aKey, startApi } from '../support/api.ts'
import { inventedProtocol } from '../support/makers.ts'
import { aStudyInput } from '../support/studyInput.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const aCoordinator = () => api.given.person({ roles: ['coordinator'] })

/** Nothing of a refused study is left: neither it, nor its guard, nor its trail. */
async function expectNothingStored(studyId: string) {
  const left = await Promise.all([
    api.fixtures.select().from(studies).where(eq(studies.id, studyId)),
    api.fixtures.select().from(studyGuards).where(eq(studyGuards.studyId, studyId)),
    api.fixtures.select().from(sites).where(eq(sites.studyId, studyId)),
    api.auditEvents(studyId),
  ])
  expect(left.flat()).toEqual([])
}

describe('making a study of earlier data', () => {
  test('stores study, sites, analytes, protocol and the lead at once, each in the study’s own trail', async () => {
    const lead = await aCoordinator()
    const input = aStudyInput()
    const response = await api.as(lead).post('/api/studies').send(input)
    expect(response.status).toBe(201)
    expect(response.body).toMatchObject({
      id: input.id,
      code: input.code,
      kind: 'earlierData',
      lockedAt: null,
      caution: CAUTIONS.researchUse,
      viewer: [{ role: 'coordinator', duty: 'studyLead', siteId: null }],
      counts: { protocolVersion: 1, plannedSubjects: 100, subjects: 0, auditEvents: 7, locks: 0 },
    })
    const events = await api.auditEvents(input.id)
    expect(events.map((event) => event.recordType)).toEqual([
      'study',
      'site',
      'site',
      'analyte',
      'analyte',
      'protocol',
      'member',
    ])
    expect(new Set(events.map((event) => event.event))).toEqual(new Set(['study.created']))
    expect(events.map((event) => event.position)).toEqual([1, 2, 3, 4, 5, 6, 7])
  })

  test('gives a gas of the catalogue its formula, CAS number and molar mass, and an own one what was said', async () => {
    const lead = await aCoordinator()
    const input = aStudyInput({
      analytes: [
        { key: 'ammonia', name: 'Ammonia', unit: '[ppm]', casNumber: '67-64-1', formula: 'wrong' },
        { key: 'marker_x', name: 'Marker X', unit: 'ug/L' },
      ],
    })
    await api.as(lead).post('/api/studies').send(input).expect(201)
    const { body } = await api.as(lead).get(`/api/studies/${input.id}/analytes`)
    expect(body).toMatchObject([
      { key: 'ammonia', unit: '[ppm]', formula: 'NH₃', casNumber: '7664-41-7' },
      { key: 'marker_x', unit: 'ug/L', formula: null, casNumber: null, molarMassGPerMol: null },
    ])
  })

  test('under the code of another study is refused at the code and leaves nothing', async () => {
    const lead = await aCoordinator()
    const taken = await api.given.study()
    const input = aStudyInput({ code: taken.code })
    const response = await api.as(lead).post('/api/studies').send(input)
    expect(response.status).toBe(409)
    expect(response.body).toMatchObject({
      code: 'already-exists',
      fields: { code: expect.any(String) },
    })
    await expectNothingStored(input.id)
  })

  test('sent twice makes one study', async () => {
    const lead = await aCoordinator()
    const input = aStudyInput()
    await api.as(lead).post('/api/studies').send(input).expect(201)
    const again = await api.as(lead).post('/api/studies').send(input)
    expect(again.status).toBe(409)
    expect(await api.auditEvents(input.id)).toHaveLength(7)
  })

  const wrong = {
    'a prefix twice': [
      { sites: [0, 1].map((n) => ({ name: `Ward ${n}`, prefix: 'N04', plannedSubjects: null })) },
      'sites.1.prefix',
    ],
    'two sites of one name': [
      {
        sites: ['N04', 'N05'].map((prefix) => ({ name: 'Ward', prefix, plannedSubjects: null })),
      },
      'sites.1.name',
    ],
    'no site': [{ sites: [] }, 'sites'],
    'an analyte twice': [
      { analytes: [0, 1].map(() => ({ key: 'ammonia', name: 'Ammonia', unit: '[ppb]' as const })) },
      'analytes.1.name',
    ],
    'a CAS number whose check digit is wrong': [
      {
        analytes: [
          { key: 'ammonia', name: 'Ammonia', unit: '[ppb]' as const },
          { key: 'own', name: 'Own', unit: '1' as const, casNumber: '7664-41-8' },
        ],
      },
      'analytes.1.casNumber',
    ],
    'a biomarker that the study does not measure': [
      {
        document: {
          ...inventedProtocol,
          primaryAnalyteKey: 'acetone',
          biomarkers: [
            { analyteKey: 'acetone', direction: 'higher' as const, plannedCutOff: null },
          ],
        },
      },
      'document.biomarkers.0.analyteKey',
    ],
    'acceptance limits the wrong way round': [
      {
        document: {
          ...inventedProtocol,
          acceptanceLimits: [{ analyteKey: 'ammonia', lower: 5, upper: -5 }],
        },
      },
      'document.acceptanceLimits.0.upper',
    ],
    'a code in small letters': [{ code: 'lark-2' }, 'code'],
  } as const
  for (const [what, [changes, field]] of Object.entries(wrong))
    test(`with ${what} is refused at ${field} and leaves nothing`, async () => {
      const lead = await aCoordinator()
      const input = { ...aStudyInput(), ...changes }
      const response = await api.as(lead).post('/api/studies').send(input)
      expect(response.status).toBe(422)
      expect(Object.keys(response.body.fields)).toContain(field)
      await expectNothingStored(input.id)
    })

  test('is not for somebody whom the provider names as monitor or analyst alone', async () => {
    const monitor = await api.given.person({ roles: ['monitor', 'analyst'] })
    const input = aStudyInput()
    const response = await api.as(monitor).post('/api/studies').send(input)
    expect(response.status).toBe(403)
    await expectNothingStored(input.id)
  })
})

describe('reading studies', () => {
  test('lists those in which the person has a place now, and no other', async () => {
    const person = await api.given.person()
    const [own, ended] = [await api.given.study(), await api.given.study()]
    await api.given.study()
    await api.given.member(own, { role: 'coordinator', site: own.north, person })
    await api.given.member(own, { role: 'coordinator', site: own.south, person })
    const line = await api.given.memberLine(ended, { role: 'monitor', person })
    await api.given.endLine(line)
    await api.given.subject(own, own.north)
    const { body } = await api.as(person).get('/api/studies')
    expect(body).toMatchObject([{ id: own.id, roles: ['coordinator'], subjectCount: 1 }])
  })

  test('shows the course its counts, and a foreign study as one that does not exist', async () => {
    const study = await api.given.study()
    const lead = await api.given.member(study, { role: 'coordinator' })
    const stranger = await api.given.person()
    for (const outcome of ['present', 'notDone'] as const) {
      const subject = await api.given.subject(study, study.north)
      await api.fixtures.insert(referenceOutcomes).values({
        id: aKey(),
        studyId: study.id,
        createdAt: new Date(),
        siteId: study.north.id,
        subjectId: subject.id,
        outcome,
      })
    }
    const { body } = await api.as(lead).get(`/api/studies/${study.id}`)
    expect(body.counts).toMatchObject({ subjects: 2, decidedOutcomes: 1, sessions: 0, reports: 0 })
    const foreign = await api.as(stranger).get(`/api/studies/${study.id}`)
    const missing = await api.as(stranger).get(`/api/studies/${aKey()}`)
    expect([foreign.status, missing.status]).toEqual([404, 404])
    expect({ ...foreign.body, requestId: '' }).toEqual({ ...missing.body, requestId: '' })
  })

  test('takes the caution from the regulatory status of the protocol that holds now', async () => {
    const study = await api.given.study({
      protocol: { ...inventedProtocol, regulatoryStatus: 'investigationalUs' },
    })
    const analyst = await api.given.member(study, { role: 'analyst' })
    const { body } = await api.as(analyst).get(`/api/studies/${study.id}`)
    expect(body.caution).toEqual(CAUTIONS.investigationalUs)
  })
})

describe('analytes', () => {
  test('of the catalogue all carry a CAS number whose check digit is right', () => {
    expect(GAS_CATALOGUE.filter((gas) => !isCasNumber(gas.casNumber))).toEqual([])
    expect(isCasNumber('7664-41-8')).toBe(false)
  })

  test('are added by a study lead, once each, with an audit event', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const path = `/api/studies/${study.id}/analytes`
    const answer = await lead.post(path).send({ key: 'isoprene', name: 'Isoprene', unit: '[ppb]' })
    expect(answer.status).toBe(201)
    expect(answer.body).toMatchObject({ formula: 'C₅H₈', casNumber: '78-79-5' })
    const again = await lead.post(path).send({ key: 'isoprene', name: 'Other', unit: '[ppm]' })
    expect(again.status).toBe(409)
    expect(again.body.fields).toHaveProperty('name')
    const events = await api.auditEvents(study.id)
    expect(events.map((event) => event.event)).toEqual(['analyte.added'])
    const stored = await api.fixtures.select().from(analytes).where(eq(analytes.studyId, study.id))
    expect(stored).toHaveLength(3)
  })

  test('are not added to locked data', async () => {
    const study = await api.given.study({ locked: true })
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const answer = await lead
      .post(`/api/studies/${study.id}/analytes`)
      .send({ key: 'isoprene', name: 'Isoprene', unit: '[ppb]' })
    expect(answer.status).toBe(423)
    expect(await api.auditEvents(study.id)).toEqual([])
  })
})

test('the line of a new study names its maker as lead', async () => {
  const lead = await aCoordinator()
  const input = aStudyInput()
  await api.as(lead).post('/api/studies').send(input).expect(201)
  const lines = await api.fixtures.select().from(members).where(eq(members.studyId, input.id))
  expect(lines).toMatchObject([
    { personId: lead.id, role: 'coordinator', duty: 'studyLead', siteId: null, endsAt: null },
  ])
})
