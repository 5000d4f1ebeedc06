import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { type Api, startApi } from '../support/api.ts'
import { fillStudy, type GivenSubject, lockThroughHttp, teamOf } from '../support/earlierData.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const GIVEN: GivenSubject[] = [
  {
    outcome: 'present',
    sessions: [
      { sensor: { ammonia: 30 }, reference: { ammonia: 28 } },
      { sensor: { ammonia: 10 }, reference: { ammonia: 12 } },
      { sensor: { ammonia: 14 } },
    ],
  },
  { outcome: 'absent', sessions: [{ sensor: { ammonia: { value: 5, belowLod: true } } }] },
  { outcome: 'present', sessions: [{ reference: { ammonia: 9 } }] },
  { outcome: 'absent', sessions: [{ sensor: { acetone: 3 } }] },
  { outcome: 'indeterminate', sessions: [{ sensor: { ammonia: 7 }, reference: { ammonia: 8 } }] },
  { outcome: 'notDone', sessions: [{ sensor: { ammonia: 7 } }] },
  { sessions: [{ sensor: { ammonia: 7 } }, { reference: { ammonia: 6 } }] },
  {},
]

async function aLockedStudy() {
  const study = await api.given.study()
  const codes = await fillStudy(api, study, GIVEN)
  const team = await teamOf(api, study)
  const { datasetId, datasetHash } = await lockThroughHttp(api, study, team)
  const ask = (path: string) => api.as(team.analyst).get(`/api/datasets/${datasetId}${path}`)
  return { study, codes, datasetId, datasetHash, ask, ...team }
}

describe('a dataset', () => {
  test('comes with its manifest, the protocol it was frozen under and the caution', async () => {
    const { study, analyst, datasetId, datasetHash, ask } = await aLockedStudy()
    const { body } = await ask('').expect(200)
    expect(body).toMatchObject({
      id: datasetId,
      hash: datasetHash,
      lockKind: 'final',
      lockNumber: 1,
      subjectCount: 8,
      // Three sessions of one subject, two of another, one of five, and a row for the one without any.
      rowCount: 11,
      manifest: { study: study.code, protocolVersion: 1, rowCount: 11 },
      protocol: { targetCondition: 'Invented condition' },
      caution: { title: 'For research use only' },
    })
    const list = await api.as(analyst).get(`/api/studies/${study.id}/datasets`).expect(200)
    expect(list.body.map((each: { hash: string }) => each.hash)).toEqual([datasetHash])
  })

  test('does not exist for anybody outside the team, and is not for a monitor', async () => {
    const { datasetId, monitor } = await aLockedStudy()
    const stranger = await api.given.person()
    await api.as(stranger).get(`/api/datasets/${datasetId}`).expect(404)
    await api.as(monitor).get(`/api/datasets/${datasetId}/values?analyteKey=ammonia`).expect(403)
  })
})

describe('values by outcome', () => {
  test('count every subject once, in or out with the first reason that applies', async () => {
    const { ask } = await aLockedStudy()
    const { body } = await ask('/values?analyteKey=ammonia&sessionRule=first').expect(200)
    expect(body).toMatchObject({
      unit: '[ppb]',
      present: [30],
      absent: [5],
      presentSubjects: null,
      counts: {
        subjects: 8,
        present: 1,
        absent: 1,
        values: 2,
        severalSessions: 1,
        belowLod: 1,
        leftOut: [
          { reason: 'noOutcome', subjects: 2 },
          { reason: 'notDone', subjects: 1 },
          { reason: 'indeterminate', subjects: 1 },
          { reason: 'noValuePresent', subjects: 1 },
          { reason: 'noValueAbsent', subjects: 1 },
        ],
      },
      caution: { title: 'For research use only' },
    })
    const out = body.counts.leftOut.reduce(
      (sum: number, each: { subjects: number }) => sum + each.subjects,
      0,
    )
    expect(out + body.counts.present + body.counts.absent).toBe(body.counts.subjects)
  })

  test('follow the session rule: every session with its subject, mean, or median', async () => {
    const { ask } = await aLockedStudy()
    const every = await ask('/values?analyteKey=ammonia').expect(200)
    expect(every.body).toMatchObject({ present: [30, 10, 14], absent: [5] })
    expect(new Set(every.body.presentSubjects).size).toBe(1)
    expect(every.body.absentSubjects).not.toContain(every.body.presentSubjects[0])
    const mean = await ask('/values?analyteKey=ammonia&sessionRule=mean').expect(200)
    expect(mean.body.present).toEqual([18])
    const median = await ask('/values?analyteKey=ammonia&sessionRule=median').expect(200)
    expect(median.body.present).toEqual([14])
  })

  test('of an analyte that the dataset has not, or by a rule that there is not, are refused at the field', async () => {
    const { ask } = await aLockedStudy()
    const analyte = await ask('/values?analyteKey=helium').expect(422)
    expect(Object.keys(analyte.body.fields)).toEqual(['analyteKey'])
    const rule = await ask('/values?analyteKey=ammonia&sessionRule=best').expect(422)
    expect(Object.keys(rule.body.fields)).toEqual(['sessionRule'])
  })
})

test('pairs join sensor and reference within one session, whatever the outcome', async () => {
  const { ask, codes } = await aLockedStudy()
  const { body } = await ask('/pairs?analyteKey=ammonia&sessionRule=mean').expect(200)
  expect(body).toMatchObject({
    sensor: [20, 7],
    reference: [20, 8],
    subjects: [codes[0], codes[4]],
    counts: {
      subjects: 8,
      counted: 2,
      pairs: 2,
      severalSessions: 1,
      belowLod: 0,
      leftOut: [
        { reason: 'neitherValue', subjects: 2 },
        { reason: 'noSensorValue', subjects: 1 },
        { reason: 'noReferenceValue', subjects: 2 },
        { reason: 'notInOneSession', subjects: 1 },
      ],
    },
  })
})
