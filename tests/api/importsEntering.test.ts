import { createHash } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { auditValues } from '#db/schema/auditValues.ts'
import { importChunks } from '#db/schema/importChunks.ts'
import { importRows } from '#db/schema/importRows.ts'
import { jobs } from '#db/schema/jobs.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { subjects } from '#db/schema/subjects.ts'
import { isSubjectCode } from '#shared/terms/subjectCode.ts'
import { type Api, startApi } from '../support/api.ts'
import { MEANINGS, studyWithLead } from '../support/imports.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const FILE = [
  'id,visit,sex,age,nh3,low,ref,label,diet',
  'A1,1,F,50,250,1,251.5,1,vegan',
  'A1,2,F,50,300,0,,1,vegan',
  'B2,1,M,,400,0,390,0,',
  'C3,1,,61,much,0,1,1,',
  '',
].join('\n')

const inStudy = async (study: { id: string }) => ({
  subjects: await api.fixtures.select().from(subjects).where(eq(subjects.studyId, study.id)),
  sessions: await api.fixtures.select().from(sessions).where(eq(sessions.studyId, study.id)),
  values: await api.fixtures
    .select()
    .from(sessionValues)
    .where(eq(sessionValues.studyId, study.id)),
  references: await api.fixtures
    .select()
    .from(referenceMeasurements)
    .where(eq(referenceMeasurements.studyId, study.id)),
  outcomes: await api.fixtures
    .select()
    .from(referenceOutcomes)
    .where(eq(referenceOutcomes.studyId, study.id)),
})

const sizes = async (study: { id: string }) =>
  Object.fromEntries(
    Object.entries(await inStudy(study)).map(([name, rows]) => [name, rows.length]),
  )

describe('entering', () => {
  test('stores subjects under codes, their sessions, values and outcomes; a blank is not stored', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.entered(FILE, MEANINGS)
    expect(of).toMatchObject({
      state: 'entered',
      counts: { rows: 4, new: 3, refused: 1, entered: { rows: 3, subjects: 2 } },
    })
    const found = await inStudy(study)
    expect(found.subjects).toHaveLength(2)
    for (const subject of found.subjects) {
      expect(subject.code).toMatch(/^N04-\d{4}-/)
      expect(isSubjectCode(subject.code)).toBe(true)
      expect(subject).toMatchObject({ siteId: study.north.id, importId: of.id })
      expect(subject.sourceDigest).not.toBe(createHash('sha256').update('A1').digest('hex'))
    }
    const first = found.subjects.find((each) => each.sex === 'F')!
    expect(first).toMatchObject({ ageBand: '50-54', covariates: { diet: 'vegan' } })
    expect(found.subjects.find((each) => each.sex === 'M')).toMatchObject({
      ageBand: null,
      covariates: {},
    })
    const numbers = found.sessions.filter((each) => each.subjectId === first.id)
    expect(numbers.map((each) => each.number).toSorted()).toEqual([1, 2])
    expect(found.values.map(({ value, belowLod }) => [value, belowLod]).toSorted()).toEqual([
      [250, true],
      [300, false],
      [400, false],
    ])
    expect(found.references.map((each) => each.value).toSorted()).toEqual([251.5, 390])
    expect(found.outcomes.map((each) => each.outcome).toSorted()).toEqual(['absent', 'present'])
  })

  test('writes one audit event for each row under its line, and the chain verifies', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.entered(FILE, MEANINGS)
    const events = await api.auditEvents(study.id)
    const ofRows = events.filter((event) => event.recordType === 'importRow')
    expect(ofRows.map((event) => event.recordLabel)).toEqual([
      'import 1, line 2',
      'import 1, line 3',
      'import 1, line 4',
    ])
    for (const event of ofRows)
      expect(event).toMatchObject({
        event: 'import.entered',
        reason: 'Earlier data come in',
        recordSiteId: study.north.id,
      })
    // The second line holds a sensor value alone.
    expect(ofRows.map((event) => event.informationClass)).toEqual(['linked', 'index', 'linked'])
    expect(
      events.map((event) => event.event).filter((event) => event !== 'import.entered'),
    ).toEqual([
      'import.uploaded',
      'import.columnsNamed',
      'import.previewed',
      'import.entryRequested',
    ])
    const values = await api.fixtures
      .select()
      .from(auditValues)
      .where(eq(auditValues.chainId, study.id))
    const line2 = values.filter((value) => value.position === ofRows[0]!.position)
    expect(Object.fromEntries(line2.map((value) => [value.field, value.newValue]))).toMatchObject({
      'subject.sex': 'F',
      'subject.ageBand': '50-54',
      'session.number': '1',
      'sessionValue ammonia.value': '250',
      'referenceMeasurement ammonia.value': '251.5',
      'referenceOutcome.outcome': 'present',
    })
    expect(JSON.stringify(values)).not.toContain('"A1"')

    const oversight = await api.given.member(study, { role: 'monitor', duty: 'oversight' })
    const verdict = await api.as(oversight).get(`/api/studies/${study.id}/audit-events/verify`)
    expect(verdict.status).toBe(200)
    expect(verdict.body).toMatchObject({
      intact: true,
      count: events.length,
      checkedTo: events.length,
    })
    expect(of.counts?.entered?.rows).toBe(ofRows.length)
  })

  test('leaves lines out that were chosen, and nothing else', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    expect((await desk.enter(of, [2])).status).toBe(202)
    await api.runJobs()
    expect(await sizes(study)).toMatchObject({ subjects: 2, sessions: 2, values: 2 })
    const rows = await desk.rows(of)
    expect(rows.map(({ line, subjectCode }) => [line, subjectCode !== null])).toEqual([
      [2, false],
      [3, true],
      [4, true],
      [5, false],
    ])
  })

  test('a line that cannot be left out, and leaving out all of them, is refused at the field', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    for (const [lines, sentence] of [
      [[5], /Line 5 is not among/],
      [[99], /Line 99 is not among/],
      [[2, 3, 4], /No row is left/],
    ] as const) {
      const response = await desk.enter(of, [...lines])
      expect(response.status).toBe(422)
      expect(response.body.fields.leaveOutLines).toMatch(sentence)
    }
    expect((await desk.get(of.id)).state).toBe('previewed')
  })

  test('needs a reason', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    const response = await desk.client
      .post(`/api/imports/${of.id}/enter`)
      .send({ leaveOutLines: [], reasonForChange: '  ', version: of.version })
    expect(response.status).toBe(422)
    expect(Object.keys(response.body.fields)).toEqual(['reasonForChange'])
    expect(await sizes(study)).toMatchObject({ subjects: 0 })
  })

  test('removes the file and what was read of it; line and code stay, for download', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.entered(FILE, MEANINGS)
    const chunks = await api.fixtures
      .select()
      .from(importChunks)
      .where(eq(importChunks.importId, of.id))
    expect(chunks).toEqual([])
    const rows = await api.fixtures.select().from(importRows).where(eq(importRows.importId, of.id))
    expect(rows.map((row) => [row.entry, row.found])).toEqual(rows.map(() => [null, null]))
    expect(JSON.stringify(rows)).not.toMatch(/A1|B2|C3|much/)
    const job = await api.fixtures.select().from(jobs).where(eq(jobs.recordId, of.id))
    expect(job.map((each) => each.payload)).toEqual(job.map(() => ({})))

    const file = await desk.client.get(`/api/imports/${of.id}/codes.csv`)
    expect(file.headers['content-disposition']).toBe('attachment; filename="import-1-codes.csv"')
    const lines = file.text.trim().split('\r\n')
    expect(lines[0]).toBe('line,subject_code')
    const codes = new Map(lines.slice(1).map((each) => each.split(',') as [string, string]))
    expect([...codes.keys()]).toEqual(['2', '3', '4'])
    expect(codes.get('2')).toBe(codes.get('3'))
    const known = (await inStudy(study)).subjects.map((each) => each.code)
    expect([...new Set(codes.values())].toSorted()).toEqual(known.toSorted())
    expect((await api.auditEvents(study.id)).at(-1)).toMatchObject({
      event: 'import.codesDownloaded',
    })

    const columns = await desk.client.get(`/api/imports/${of.id}/columns`)
    expect(columns.status).toBe(409)
  })
})

describe('coming again', () => {
  test('the same file after entering changes nothing and says which import it was', async () => {
    const { study, desk } = await studyWithLead(api)
    const first = await desk.entered(FILE, MEANINGS)
    const before = await inStudy(study)
    const again = await desk.judged(FILE, MEANINGS)
    expect(again).toMatchObject({
      number: 2,
      sameFile: { id: first.id, number: 1, state: 'entered' },
      counts: { new: 0, same: 3, refused: 1 },
    })
    const third = await desk.upload(FILE)
    expect(third.body).toMatchObject({ code: 'already-exists', more: { importNumber: 2 } })
    const response = await desk.enter(again)
    expect(response.status).toBe(422)
    expect(await inStudy(study)).toEqual(before)
  })

  test('what is new about subjects that are here is added to them; what contradicts is refused', async () => {
    const { study, desk } = await studyWithLead(api)
    await desk.entered('id,sex,nh3\nA1,F,250\nB2,M,300\nC3,F,350\nD4,,360\n', {
      id: MEANINGS.id,
      sex: MEANINGS.sex,
      nh3: MEANINGS.nh3,
    })
    const before = await inStudy(study)
    const second = await desk.judged(
      'id,visit,sex,nh3,ref,label\nA1,1,F,250,249,1\nB2,2,M,310,,0\nC3,1,F,999,,\nD4,1,F,360,,\n',
      MEANINGS,
    )
    const rows = await desk.rows(second)
    expect(rows.map(({ line, fate, problems }) => [line, fate, problems[0]?.reason])).toEqual([
      [2, 'new', undefined],
      [3, 'new', undefined],
      [4, 'refused', 'Session 1 of this subject is here already with another value.'],
      [
        5,
        'refused',
        'This subject is here already without it. An import does not change saved subjects.',
      ],
    ])
    expect((await desk.enter(second)).status).toBe(202)
    await api.runJobs()
    const after = await inStudy(study)
    expect(after.subjects).toEqual(before.subjects)
    expect(after.sessions).toHaveLength(before.sessions.length + 1)
    expect(after.values).toHaveLength(before.values.length + 1)
    expect(after.references.map((each) => each.value)).toEqual([249])
    expect(after.outcomes).toHaveLength(2)
  })

  test('two files of the same subjects that were both checked do not enter them twice', async () => {
    const { study, desk } = await studyWithLead(api)
    const meanings = { id: MEANINGS.id, nh3: MEANINGS.nh3 }
    const one = await desk.judged('id,nh3\nA1,250\nB2,300\n', meanings)
    const two = await desk.judged('id,nh3\nA1,250\nB2,300\n\n', meanings)
    await desk.enter(one)
    await desk.enter(two)
    await api.runJobs()
    expect(await sizes(study)).toMatchObject({ subjects: 2, sessions: 2, values: 2 })
    const late = await desk.get(two.id)
    expect(late.state).toBe('previewed')
    expect(late.failure).toMatch(/Nothing was entered/)
  })

  test('subjects of one study are not found in another', async () => {
    const first = await studyWithLead(api)
    const second = await studyWithLead(api)
    const meanings = { id: MEANINGS.id, nh3: MEANINGS.nh3 }
    await first.desk.entered('id,nh3\nA1,250\n', meanings)
    const of = await second.desk.judged('id,nh3\nA1,999\n', meanings)
    expect(of.counts).toMatchObject({ new: 1, refused: 0 })
  })
})

describe('work that ends early', () => {
  test('stopped by the person who asked: nothing is written and the import is where it was', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    const { body } = await desk.enter(of)
    expect(body).toMatchObject({ state: 'entering', work: { own: true, stopping: false } })
    expect((await desk.client.post(`/api/jobs/${body.work.jobId}/cancel`)).status).toBe(200)
    await api.runJobs()
    expect(await desk.get(of.id)).toMatchObject({
      state: 'previewed',
      work: null,
      stopped: true,
      failure: 'Stopped on request. Nothing was changed.',
    })
    expect(await sizes(study)).toMatchObject({ subjects: 0, sessions: 0 })
    // And it can be entered after all.
    await desk.enter(of)
    await api.runJobs()
    expect((await desk.get(of.id)).state).toBe('entered')
  })

  test('nobody else may stop it', async () => {
    const { study, desk } = await studyWithLead(api)
    const other = await api.given.member(study, { role: 'coordinator', duty: 'studyLead' })
    const of = await desk.judged(FILE, MEANINGS)
    const { body } = await desk.enter(of)
    const refused = await api.as(other).post(`/api/jobs/${body.work.jobId}/cancel`)
    expect(refused.status).toBe(404)
    const seen = await api.as(other).get(`/api/imports/${of.id}`)
    expect(seen.body.work).toMatchObject({ own: false })
    await api.runJobs()
  })

  test('a lock after the check refuses the entering; a lock in the midst leaves nothing half-written', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    expect((await desk.enter(of)).status).toBe(202)
    await api.given.lock(study)
    await api.runJobs()
    expect(await desk.get(of.id)).toMatchObject({
      state: 'previewed',
      failure: 'The data are locked. Nothing was changed.',
    })
    expect(await sizes(study)).toMatchObject({ subjects: 0, sessions: 0, values: 0, outcomes: 0 })
    const events = await api.auditEvents(study.id)
    expect(events.filter((event) => event.recordType === 'importRow')).toEqual([])

    const asked = await desk.enter(of)
    expect(asked.status).toBe(423)
    expect(asked.body.code).toBe('locked')
    expect((await desk.upload('id,nh3\nZ9,1\n')).status).toBe(423)
    // Looking at it, and throwing it away, is still possible.
    expect(await desk.rows(of)).toHaveLength(4)
    const discarded = await desk.client
      .post(`/api/imports/${of.id}/discard`)
      .send({ reasonForChange: 'Too late', version: of.version + 1 })
    expect(discarded.status).toBe(200)
  })

  test('while a file is being checked or entered, nothing else can be done with it', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    expect((await desk.enter(of)).status).toBe(202)
    const { version, mapping } = await desk.get(of.id)
    const again = await Promise.all([
      desk.enter(of),
      desk.client.post(`/api/imports/${of.id}/preview`).send({ mapping, version }),
      desk.client
        .post(`/api/imports/${of.id}/discard`)
        .send({ reasonForChange: 'No more', version }),
    ])
    expect(again.map((response) => [response.status, response.body.code])).toEqual(
      again.map(() => [409, 'not-in-this-state']),
    )
    await api.runJobs()
    expect((await desk.get(of.id)).state).toBe('entered')
  })

  test('discarding takes a reason, removes bytes and rows, and the same file may come again', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(FILE, MEANINGS)
    const response = await desk.client
      .post(`/api/imports/${of.id}/discard`)
      .send({ reasonForChange: 'The wrong file', version: of.version })
    expect(response.body).toMatchObject({ state: 'discarded' })
    for (const table of [importChunks, importRows])
      expect(await api.fixtures.select().from(table).where(eq(table.importId, of.id))).toEqual([])
    expect((await api.auditEvents(study.id)).at(-1)).toMatchObject({
      event: 'import.discarded',
      reason: 'The wrong file',
    })
    expect((await desk.upload(FILE)).status).toBe(201)
  })
})
