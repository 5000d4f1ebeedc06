import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { type Api, startApi } from '../support/api.ts'
import { inventedProtocol } from '../support/makers.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function aLead(options: { locked?: boolean } = {}) {
  const study = await api.given.study(options)
  const lead = api.as(await api.given.member(study, { role: 'coordinator', duty: 'studyLead' }))
  const path = `/api/studies/${study.id}/protocol`
  const stored = () =>
    api.fixtures.select().from(protocolVersions).where(eq(protocolVersions.studyId, study.id))
  return { study, lead, path, stored }
}
const amended = { ...inventedProtocol, plannedSubjects: 120 }
const anAmendment = { document: amended, basedOn: 1, reasonForChange: 'More sites joined' }

test('an amendment is a new version with its reason and hash; the old one stays as it was', async () => {
  const { study, lead, path } = await aLead()
  const answer = await lead.post(path).send(anAmendment)
  expect(answer.status).toBe(201)
  expect(answer.body).toMatchObject({
    number: 2,
    document: amended,
    documentHash: sha256Hex(canonicalJson(amended)),
    reason: 'More sites joined',
  })
  const { body: versions } = await lead.get(`${path}/versions`)
  expect(versions.map((each: { number: number }) => each.number)).toEqual([2, 1])
  expect(versions[1].document).toEqual(inventedProtocol)
  const { body: current } = await lead.get(path)
  expect(current.number).toBe(2)
  const { body: frame } = await lead.get(`/api/studies/${study.id}`)
  expect(frame.counts).toMatchObject({ protocolVersion: 2, plannedSubjects: 120 })
  expect(await api.auditEvents(study.id)).toMatchObject([
    { event: 'protocol.amended', reason: 'More sites joined', recordLabel: 'version 2' },
  ])
})

test('an amendment of a version that is no longer the newest is refused and stores nothing', async () => {
  const { study, lead, path, stored } = await aLead()
  await lead.post(path).send(anAmendment).expect(201)
  const late = await lead
    .post(path)
    .send({ ...anAmendment, document: { ...amended, plannedSubjects: 200 } })
  expect(late.status).toBe(409)
  expect(late.body).toMatchObject({ code: 'changed-meanwhile', more: { number: 2 } })
  expect(await stored()).toHaveLength(2)
  expect(await api.auditEvents(study.id)).toHaveLength(1)
})

test('two amendments at once leave one new version', async () => {
  const { lead, path, stored } = await aLead()
  const answers = await Promise.all(
    [130, 140].map((plannedSubjects) =>
      lead.post(path).send({ ...anAmendment, document: { ...amended, plannedSubjects } }),
    ),
  )
  expect(answers.map((each) => each.status).sort()).toEqual([201, 409])
  expect(answers.find((each) => each.status === 409)?.body.code).toBe('changed-meanwhile')
  expect(await stored()).toHaveLength(2)
})

test('an amendment that changes nothing, names a strange analyte or gives no reason is refused', async () => {
  const { study, lead, path, stored } = await aLead()
  const same = await lead.post(path).send({ ...anAmendment, document: inventedProtocol })
  expect([same.status, same.body.message]).toEqual([422, 'Nothing differs from version 1.'])
  const strange = await lead.post(path).send({
    ...anAmendment,
    document: {
      ...amended,
      acceptanceLimits: [{ analyteKey: 'isoprene', lower: -1, upper: 1 }],
    },
  })
  expect(strange.status).toBe(422)
  expect(Object.keys(strange.body.fields)).toEqual(['document.acceptanceLimits.0.analyteKey'])
  const silent = await lead.post(path).send({ ...anAmendment, reasonForChange: ' ' })
  expect(silent.body.fields).toHaveProperty('reasonForChange')
  expect(await stored()).toHaveLength(1)
  expect(await api.auditEvents(study.id)).toEqual([])
})

test('a locked study keeps its protocol', async () => {
  const { study, lead, path, stored } = await aLead({ locked: true })
  expect((await lead.post(path).send(anAmendment)).status).toBe(423)
  expect(await stored()).toHaveLength(1)
  expect(await api.auditEvents(study.id)).toEqual([])
})

test('everybody in the team reads the protocol, nobody else does, and a monitor does not amend it', async () => {
  const { study, path } = await aLead()
  const monitor = api.as(await api.given.member(study, { role: 'monitor' }))
  const stranger = api.as(await api.given.person())
  await monitor.get(path).expect(200)
  await monitor.post(path).send(anAmendment).expect(403)
  await stranger.get(path).expect(404)
  await stranger.get(`${path}/versions`).expect(404)
})
