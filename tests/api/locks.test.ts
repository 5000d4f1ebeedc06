import { createHash } from 'node:crypto'
import { asc, eq } from 'drizzle-orm'
import mysql from 'mysql2/promise'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { datasetRows } from '#db/schema/datasetRows.ts'
import { datasets } from '#db/schema/datasets.ts'
import { imports } from '#db/schema/imports.ts'
import { signatures } from '#db/schema/signatures.ts'
import { signingGrants } from '#db/schema/signingGrants.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { LOCK_APPROVAL_MEANING } from '#shared/terms/lockState.ts'
import { type Api, aKey, startApi } from '../support/api.ts'
import {
  authenticatedAfresh,
  fillStudy,
  type GivenSubject,
  lockThroughHttp,
  teamOf,
} from '../support/earlierData.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

/** Two complete subjects, one indeterminate without a value, one without anything. */
const FEW: GivenSubject[] = [
  { outcome: 'present', sessions: [{ sensor: { ammonia: 1200 }, reference: { ammonia: 1180 } }] },
  { outcome: 'absent', sessions: [{ sensor: { ammonia: 400 } }, { sensor: { ammonia: 380 } }] },
  { outcome: 'indeterminate', sessions: [{}] },
  {},
]

async function aStudy(given: GivenSubject[] = FEW) {
  const study = await api.given.study()
  const codes = await fillStudy(api, study, given)
  return { study, codes, ...(await teamOf(api, study)) }
}

async function aRequestedLock(given?: GivenSubject[]) {
  const made = await aStudy(given)
  const { body } = await api
    .as(made.lead)
    .post(`/api/studies/${made.study.id}/locks`)
    .send({ id: aKey(), note: 'The survey is complete.' })
    .expect(201)
  return { ...made, lock: body, purpose: `lock.approve:${body.id}` }
}

const because = (version: number) => ({ reasonForChange: 'Checklist read', version })

describe('the checklist', () => {
  test('counts what blocks and what is worth knowing, as it stands now', async () => {
    const { study, lead } = await aStudy()
    const { body } = await api.as(lead).get(`/api/studies/${study.id}/lock`).expect(200)
    const left = Object.fromEntries(
      body.checklist.map((check: { key: string; left: number; blocking: boolean }) => [
        check.key,
        [check.left, check.blocking],
      ]),
    )
    expect(left).toEqual({
      subjects: [0, true],
      imports: [0, true],
      sensorValues: [2, false],
      outcomes: [1, false],
      indeterminateOutcomes: [1, false],
      referenceValues: [2, false],
      analytes: [0, false],
      refusedRows: [0, false],
    })
    expect(body).toMatchObject({ lockedAt: null, locks: [], caution: { title: /./ } })
  })

  test('blocks a study without subjects, and one with a file that is neither entered nor discarded', async () => {
    const { study, lead, monitor } = await aStudy([])
    await api.fixtures.insert(imports).values({
      id: aKey(),
      studyId: study.id,
      createdAt: new Date(),
      number: 3,
      state: 'previewed',
      fileHash: '0'.repeat(64),
      fileBytes: 10,
      uploadedBy: lead.id,
    })
    const asked = await api
      .as(lead)
      .post(`/api/studies/${study.id}/locks`)
      .send({ id: aKey() })
      .expect(201)
    await authenticatedAfresh(api, monitor, `lock.approve:${asked.body.id}`)
    const refused = await api
      .as(monitor)
      .post(`/api/locks/${asked.body.id}/approve`)
      .send(because(1))
    expect(refused.status).toBe(409)
    expect(refused.body.message).toContain('subjects in the study')
    expect(refused.body.message).toContain('imports neither entered nor discarded')

    const page = await api.as(lead).get(`/api/studies/${study.id}/lock`).expect(200)
    const imported = page.body.checklist.find((check: { key: string }) => check.key === 'imports')
    expect(imported).toMatchObject({ left: 1, detail: 'no. 3: ready to enter' })
    // The refusal used up no fresh authentication.
    const grants = await api.fixtures
      .select()
      .from(signingGrants)
      .where(eq(signingGrants.personId, monitor.id))
    expect(grants.map((grant) => grant.usedAt)).toEqual([null])
  })
})

describe('asking for the lock', () => {
  test('is for one request at a time, and its number goes up', async () => {
    const { study, lead, lock } = await aRequestedLock()
    expect(lock).toMatchObject({ number: 1, state: 'requested', kind: 'final' })
    const second = await api.as(lead).post(`/api/studies/${study.id}/locks`).send({ id: aKey() })
    expect([second.status, second.body.code]).toEqual([409, 'not-in-this-state'])

    await api.as(lead).post(`/api/locks/${lock.id}/withdraw`).send(because(1)).expect(200)
    const third = await api.as(lead).post(`/api/studies/${study.id}/locks`).send({ id: aKey() })
    expect([third.status, third.body.number]).toEqual([201, 2])
  })

  test('by two people at once leaves one open request', async () => {
    const { study, lead } = await aStudy()
    const ask = () => api.as(lead).post(`/api/studies/${study.id}/locks`).send({ id: aKey() })
    const answers = await Promise.all([ask(), ask(), ask()])
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409, 409])
    const page = await api.as(lead).get(`/api/studies/${study.id}/lock`).expect(200)
    expect(page.body.locks).toHaveLength(1)
  })

  test('in a prospective study is refused: its lock has more steps', async () => {
    const study = await api.given.study({ kind: 'prospective' })
    const lead = await api.given.member(study, { role: 'coordinator', duty: 'studyLead' })
    const answer = await api.as(lead).post(`/api/studies/${study.id}/locks`).send({ id: aKey() })
    expect([answer.status, answer.body.code]).toEqual([409, 'wrong-kind-of-study'])
  })
})

describe('withdrawing and sending back', () => {
  test('take a reason, keep the checklist as it stood, and end the request', async () => {
    const { lead, monitor, lock, study } = await aRequestedLock()
    const bare = await api.as(monitor).post(`/api/locks/${lock.id}/return`).send({ version: 1 })
    expect([bare.status, Object.keys(bare.body.fields)]).toEqual([422, ['reasonForChange']])

    const sent = await api
      .as(monitor)
      .post(`/api/locks/${lock.id}/return`)
      .send({ reasonForChange: 'One file is missing', version: 1 })
    expect(sent.body).toMatchObject({
      state: 'returned',
      decisionNote: 'One file is missing',
      decidedByName: monitor.name,
    })
    expect(sent.body.checklist).toHaveLength(8)

    const late = await api.as(lead).post(`/api/locks/${lock.id}/withdraw`).send(because(2))
    expect([late.status, late.body.code]).toEqual([409, 'not-in-this-state'])
    const events = await api.auditEvents(study.id)
    expect(events.map((event) => event.event)).toEqual(['lock.requested', 'lock.returned'])
    expect(events[1]?.reason).toBe('One file is missing')
  })
})

describe('approving', () => {
  test('needs a fresh authentication for this very lock, good once and for minutes', async () => {
    const { monitor, lock, purpose } = await aRequestedLock()
    const approve = () => api.as(monitor).post(`/api/locks/${lock.id}/approve`).send(because(1))
    const without = await approve()
    expect([without.status, without.body.code]).toEqual([401, 'signature-needed'])
    expect(without.body.more.signAt).toBe(`/auth/sign?purpose=${encodeURIComponent(purpose)}`)

    await authenticatedAfresh(api, monitor, `lock.approve:${aKey()}`)
    expect((await approve()).body.code).toBe('signature-needed')
    await authenticatedAfresh(api, monitor, purpose, { endsInMs: -1 })
    expect((await approve()).body.code).toBe('signature-needed')
    await authenticatedAfresh(api, monitor, purpose)
    expect((await approve()).status).toBe(200)
  })

  test('is never for the person who asked', async () => {
    const { study } = await aStudy()
    // As the team list would never allow: one person with two roles.
    const both = await api.given.person({ roles: ['coordinator', 'monitor'] })
    await api.given.member(study, { role: 'coordinator', duty: 'studyLead', person: both })
    await api.given.member(study, { role: 'monitor', duty: 'oversight', person: both })
    const { body: lock } = await api
      .as(both)
      .post(`/api/studies/${study.id}/locks`)
      .send({ id: aKey() })
      .expect(201)
    await authenticatedAfresh(api, both, `lock.approve:${lock.id}`)
    for (const verb of ['approve', 'return']) {
      const answer = await api.as(both).post(`/api/locks/${lock.id}/${verb}`).send(because(1))
      expect([answer.status, answer.body.code]).toEqual([403, 'own-request'])
    }
  })

  test('of a version that somebody changed meanwhile is refused', async () => {
    const { monitor, lock, purpose } = await aRequestedLock()
    await authenticatedAfresh(api, monitor, purpose)
    const answer = await api.as(monitor).post(`/api/locks/${lock.id}/approve`).send(because(7))
    expect([answer.status, answer.body.code]).toEqual([409, 'changed-meanwhile'])
  })

  test('freezes rows, manifest and signature under hashes that anybody can compute again', async () => {
    const { study, codes, monitor, lock, purpose } = await aRequestedLock()
    await authenticatedAfresh(api, monitor, purpose)
    const { body } = await api
      .as(monitor)
      .post(`/api/locks/${lock.id}/approve`)
      .send(because(1))
      .expect(200)
    const [dataset] = await api.fixtures
      .select()
      .from(datasets)
      .where(eq(datasets.id, body.datasetId))
    const rows = await api.fixtures
      .select()
      .from(datasetRows)
      .where(eq(datasetRows.datasetId, body.datasetId))
      .orderBy(asc(datasetRows.position))
    // Four subjects, one of them with two sessions.
    expect(rows.map(({ row }) => [row.subject, row.session])).toEqual([
      [codes[0], 1],
      [codes[1], 1],
      [codes[1], 2],
      [codes[2], 1],
      [codes[3], null],
    ])
    expect(rows[0]?.row).toMatchObject({
      site: 'N04',
      outcome: 'present',
      sensorValues: { ammonia: { value: 1200, belowLod: false } },
      referenceValues: { ammonia: 1180 },
    })
    for (const { row, hash } of rows) expect(sha256Hex(canonicalJson(row))).toBe(hash)
    const rowsHash = createHash('sha256')
    for (const { hash } of rows) rowsHash.update(`${hash}\n`)
    expect(dataset?.manifest.rowsHash).toBe(rowsHash.digest('hex'))
    expect(sha256Hex(canonicalJson(dataset?.manifest))).toBe(dataset?.hash)
    expect(dataset?.manifest).toMatchObject({ subjectCount: 4, rowCount: 5, auditCount: 1 })
    expect(dataset?.manifest.tables.map(({ name, records }) => [name, records])).toEqual([
      ['sites', 2],
      ['analytes', 2],
      ['protocol_versions', 1],
      ['subjects', 4],
      ['sessions', 4],
      ['session_values', 3],
      ['reference_measurements', 1],
      ['reference_outcomes', 3],
    ])

    const events = await api.auditEvents(study.id)
    // The trail as it stood when the rows were frozen: one event, the request.
    expect(dataset?.manifest.auditHeadHash).toBe(events[0]?.hash)
    expect(body).toMatchObject({
      state: 'approved',
      datasetHash: dataset?.hash,
      signature: {
        printedName: monitor.name,
        meaning: LOCK_APPROVAL_MEANING,
        recordHash: dataset?.hash,
      },
    })
    const [signature] = await api.fixtures
      .select()
      .from(signatures)
      .where(eq(signatures.recordId, body.datasetId))
    expect(signature?.auditHeadHash).toBe(events[0]?.hash)
  })

  test('twice at once is done once', async () => {
    const { study, monitor, lock, purpose } = await aRequestedLock()
    const other = await api.given.member(study, { role: 'monitor', duty: 'oversight' })
    await authenticatedAfresh(api, monitor, purpose)
    await authenticatedAfresh(api, other, purpose)
    const answers = await Promise.all(
      [monitor, other].map((person) =>
        api.as(person).post(`/api/locks/${lock.id}/approve`).send(because(1)),
      ),
    )
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 423])
    const kept = await api.fixtures.select().from(datasets).where(eq(datasets.studyId, study.id))
    expect(kept).toHaveLength(1)
  })
})

describe('after the lock', () => {
  test('the service refuses every write of study data with `locked` and notes nothing', async () => {
    const { study, lead, monitor } = await aStudy()
    await lockThroughHttp(api, study, { lead, monitor })
    const before = await api.auditEvents(study.id)
    const answers = await Promise.all([
      api.as(lead).post(`/api/sites/${study.north.id}/subjects`).send({
        id: aKey(),
        sex: 'F',
        ageBand: '50-54',
      }),
      api.as(lead).post(`/api/studies/${study.id}/locks`).send({ id: aKey() }),
    ])
    expect(answers.map((answer) => [answer.status, answer.body.code])).toEqual([
      [423, 'locked'],
      [423, 'locked'],
    ])
    expect(await api.auditEvents(study.id)).toEqual(before)
  })

  test("the database refuses the application's own account, statement by statement and in bulk", async () => {
    const { study, lead, monitor } = await aStudy()
    const { datasetId } = await lockThroughHttp(api, study, { lead, monitor })
    const application = await mysql.createConnection({ uri: api.urls.appUrl, timezone: 'Z' })
    const refusal = async (statement: string, values: unknown[] = []) => {
      const error: unknown = await application.query(statement, values).then(
        () => 'done',
        (thrown: unknown) => thrown,
      )
      return error instanceof Error ? error.message : error
    }
    try {
      const locked = /locked: the data of this study are locked/
      const denied = /denied/
      const newSubject = [aKey(), study.id, study.north.id, 'N04-9999-X']
      expect(
        await refusal(
          "INSERT INTO subjects (id, study_id, version, created_at, site_id, code, enrolled_at, covariates) VALUES (?, ?, 1, NOW(3), ?, ?, NOW(3), '{}')",
          newSubject,
        ),
      ).toMatch(locked)
      for (const table of [
        'subjects',
        'sessions',
        'session_values',
        'reference_measurements',
        'reference_outcomes',
        'sites',
        'analytes',
      ]) {
        expect(
          await refusal(`UPDATE ${table} SET version = version + 1 WHERE study_id = ?`, [study.id]),
        ).toMatch(locked)
        // Without a condition: all studies at once.
        expect(await refusal(`UPDATE ${table} SET version = version + 1`)).toMatch(locked)
        expect(await refusal(`DELETE FROM ${table} WHERE study_id = ?`, [study.id])).toMatch(denied)
        expect(await refusal(`TRUNCATE TABLE ${table}`)).toMatch(denied)
        expect(await refusal(`DROP TABLE ${table}`)).toMatch(denied)
      }
      expect(
        await refusal('UPDATE session_values SET value = 1 WHERE study_id = ?', [study.id]),
      ).toMatch(locked)
      for (const table of ['dataset_rows', 'datasets', 'audit_events', 'signatures']) {
        const column = { datasets: 'hash', signatures: 'meaning' }[table] ?? 'hash'
        expect(await refusal(`UPDATE ${table} SET ${column} = ''`)).toMatch(denied)
        expect(await refusal(`DELETE FROM ${table}`)).toMatch(denied)
        expect(await refusal(`TRUNCATE TABLE ${table}`)).toMatch(denied)
      }
      expect(
        await refusal(
          "INSERT INTO dataset_rows (dataset_id, position, `row`, hash) VALUES (?, 99, '{}', '')",
          [datasetId],
        ),
      ).toMatch(/frozen: the dataset stands/)
      // The owner's account has the rights, and the triggers still refuse.
      const owner = await mysql.createConnection({ uri: api.urls.migrateUrl, timezone: 'Z' })
      try {
        for (const statement of [
          "UPDATE dataset_rows SET hash = ''",
          'DELETE FROM dataset_rows',
          "UPDATE datasets SET hash = ''",
          'DELETE FROM datasets',
          "UPDATE audit_events SET reason = ''",
          'DELETE FROM audit_events',
        ])
          await expect(owner.query(statement)).rejects.toThrow(/append-only/)
        await expect(
          owner.query('DELETE FROM subjects WHERE study_id = ?', [study.id]),
        ).rejects.toThrow(locked)
      } finally {
        await owner.end()
      }
    } finally {
      await application.end()
    }
  })
})

test('18,000 subjects freeze within seconds, and other pages answer meanwhile', async () => {
  const { lead, monitor, lock, purpose } = await aRequestedLock(
    Array.from({ length: 18_000 }, (_, at) => ({
      outcome: at % 10 === 0 ? ('present' as const) : ('absent' as const),
      sessions: [
        { sensor: { ammonia: 100 + (at % 977) }, reference: { ammonia: 90 + (at % 977) } },
      ],
    })),
  )
  await authenticatedAfresh(api, monitor, purpose)
  const startedAt = performance.now()
  let slowestMs = 0
  let done = false
  const approving = api
    .as(monitor)
    .post(`/api/locks/${lock.id}/approve`)
    .send(because(1))
    .then((answer) => {
      done = true
      return answer
    })
  let asked = 0
  while (!done) {
    const askedAt = performance.now()
    await api.as(lead).get('/api/me').expect(200)
    slowestMs = Math.max(slowestMs, performance.now() - askedAt)
    asked += 1
  }
  const { status, body } = await approving
  const seconds = (performance.now() - startedAt) / 1000
  console.info(
    `18,000 subjects frozen in ${seconds.toFixed(1)} s; ${asked} other requests meanwhile, the slowest in ${slowestMs.toFixed(0)} ms`,
  )
  expect([status, body.state]).toEqual([200, 'approved'])
  expect(seconds).toBeLessThan(20)
  expect(slowestMs).toBeLessThan(4_000)
}, 120_000)
