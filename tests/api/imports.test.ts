import { readFileSync } from 'node:fs'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { auditValues } from '#db/schema/auditValues.ts'
import { imports } from '#db/schema/imports.ts'
import type { ImportMapping } from '#shared/schemas/import.ts'
import { type Api, startApi } from '../support/api.ts'
import { MEANINGS, studyWithLead } from '../support/imports.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const sample = (name: string) =>
  readFileSync(new URL(`../support/files/${name}`, import.meta.url), 'utf8')

describe('a file that is no table', () => {
  const tooManyColumns = `${Array.from({ length: 1_000_000 }, (_, n) => `c${n}`).join(',')}\n`
  const refusals: [what: string, content: string | Buffer, sentence: RegExp][] = [
    ['an empty file', '', /empty/],
    ['blank lines alone', '\n\n \n', /blank lines/],
    ['a workbook under the name of a CSV', Buffer.from('504b030414000600', 'hex'), /spreadsheet/],
    ['a PDF', '%PDF-1.7 …', /PDF/],
    ['bytes that are no text', Buffer.from([97, 44, 98, 10, 0, 1, 2]), /not a text file/],
    ['text in Latin-1', Buffer.from([110, 97, 109, 101, 44, 228, 10, 49, 44, 50]), /UTF-8/],
    ['text in UTF-16', Buffer.from('\ufeffid,nh3\n1,2\n', 'utf16le'), /UTF-16/],
    ['one column', 'id\n1\n2\n', /one column/],
    ['headings alone', 'id,nh3\n', /no rows/],
    ['no headings', '17,250\n18,260\n', /headed by a number/],
    ['a column without a heading', 'id,,nh3\n1,2,3\n', /Column 2 has no heading/],
    ['the same heading twice', 'id,nh3,nh3\n1,2,3\n', /Columns 2 and 3/],
    ['a million columns', tooManyColumns, /1,000,000 columns|too long/],
    ['a quotation mark that is never closed', 'id,nh3\n1,"2\n3,4\n', /[Qq]uotation marks/],
  ]
  test.each(refusals)(
    '%s is refused in words at the field, and nothing is kept',
    async (...given) => {
      const [, content, sentence] = given
      const { study, desk } = await studyWithLead(api)
      const response = await desk.upload(content)
      expect(response.status).toBe(422)
      expect(response.body.fields.file).toMatch(sentence)
      expect(
        await api.fixtures.select().from(imports).where(eq(imports.studyId, study.id)),
      ).toEqual([])
      expect(await api.auditEvents(study.id)).toEqual([])
    },
  )

  test('more than 50 MB is refused', async () => {
    const { desk } = await studyWithLead(api)
    const response = await desk.upload(Buffer.alloc(50_000_001, 'a'))
    expect(response.status).toBe(413)
    expect(response.body.fields.file).toBe('At most 50 MB.')
  })

  test('a request without a file is refused at the field', async () => {
    const { study, desk } = await studyWithLead(api)
    const response = await desk.client.post(`/api/studies/${study.id}/imports`)
    expect(response.status).toBe(422)
    expect(response.body.fields.file).toBe('Choose a file.')
  })

  test('a cell of a monstrous length stops the reading with its line, and nothing is kept of the rows', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(`id,nh3,said\n1,250,\n2,260,"${'x\n'.repeat(9000)}"\n`, {
      id: MEANINGS.id,
      nh3: MEANINGS.nh3,
    })
    expect(of).toMatchObject({ state: 'failed', counts: null })
    expect(of.failure).toMatch(/^Line 3 has a cell of more than 10,000 characters\./)
    expect(await desk.rows(of)).toEqual([])
  })
})

describe('uploading', () => {
  test('reads headings, proposes the delimiter and the meanings, and keeps no file name', async () => {
    const { study, lead, desk } = await studyWithLead(api)
    const response = await desk.upload(sample('invented-plain.csv'), 'Jane Invented 3 May 1950.csv')
    expect(response.body).toMatchObject({ number: 1, state: 'uploaded', uploadedByName: lead.name })
    const { body: reading } = await desk.client.get(`/api/imports/${response.body.id}/columns`)
    expect(reading).toMatchObject({ delimiter: ',', rowsRead: 60, wholeFile: true })
    const suggested = Object.fromEntries(
      reading.columns.map((c: { name: string; suggestion: unknown }) => [c.name, c.suggestion]),
    )
    expect(suggested).toEqual({
      id: { as: 'subject' },
      site: { as: 'site' },
      sex: { as: 'sex', F: ['F'], M: ['M'], other: [], unknown: [] },
      age: { as: 'ageYears', andOver: null },
      ammonia_ppb: { as: 'sensorValue', analyteKey: 'ammonia' },
      ammonia_ref_ppb: { as: 'referenceValue', analyteKey: 'ammonia' },
      label: { as: 'outcome', present: ['1'], absent: ['0'], indeterminate: [] },
    })
    expect(reading.sitesByWord).toEqual({ N04: study.north.id, N02: study.south.id })

    const everything = JSON.stringify([
      await api.fixtures.select().from(imports),
      await api.fixtures.select().from(auditValues),
      await api.auditEvents(study.id),
    ])
    expect(everything).not.toContain('Jane')
    // Values of the file go to no log either: headings alone are in the trail.
    expect(everything).toContain('ammonia_ref_ppb')
    expect(everything).not.toContain('V001')
  })

  test('columns that look like names, dates of birth, record numbers, contacts or comments show no value', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.uploaded(
      [
        'id,who,dob,number,reach,said,nh3',
        'A1,"Invented, Ada",1950-02-01,1234567890,ada@home.example,"felt quite dizzy after lunch but went on all the same",250',
        'A2,"Madeup, Ben",1951-02-01,1234567891,ben@home.example,"slept rather badly because of the noise in the ward",260',
      ].join('\n'),
    )
    const { body } = await desk.client.get(`/api/imports/${of.id}/columns`)
    const found = body.columns.map((c: Record<string, unknown>) => [c.name, c.suspicion, c.samples])
    expect(found).toEqual([
      ['id', null, ['A1', 'A2']],
      ['who', 'name', []],
      ['dob', 'dateOfBirth', []],
      ['number', 'recordNumber', []],
      ['reach', 'contact', []],
      ['said', 'freeText', []],
      ['nh3', null, ['250', '260']],
    ])
    expect(JSON.stringify(body)).not.toMatch(/Ada|1950|1234567890|home\.example|dizzy/)
    for (const column of body.columns)
      if (column.suspicion) expect(column.suggestion).toEqual({ as: 'leaveOut' })
  })

  test('the same file, while the first is not finished, is refused and says where to go on', async () => {
    const { study, desk } = await studyWithLead(api)
    const first = await desk.uploaded(sample('invented-plain.csv'))
    const before = await api.auditEvents(study.id)
    const again = await desk.upload(sample('invented-plain.csv'), 'another name.csv')
    expect(again.status).toBe(409)
    expect(again.body).toMatchObject({
      code: 'already-exists',
      more: { importId: first.id, importNumber: 1 },
    })
    expect(await api.auditEvents(study.id)).toEqual(before)
  })

  test('a prospective study takes no file', async () => {
    const study = await api.given.study({ kind: 'prospective' })
    const lead = await api.given.member(study, { role: 'coordinator', duty: 'studyLead' })
    const response = await api
      .as(lead)
      .post(`/api/studies/${study.id}/imports`)
      .attach('file', Buffer.from('id,nh3\n1,2\n'), 'file.csv')
    expect(response.status).toBe(409)
    expect(response.body.code).toBe('wrong-kind-of-study')
  })
})

describe('the meaning of the columns', () => {
  const FILE = 'id,sex,age,nh3,low,ref,label,name\nA1,F,50,250,0,251,1,x\n'
  type Spoil = (mapping: ImportMapping) => unknown
  const meant = { ...MEANINGS }
  const mistakes: [what: string, field: string, spoil: Spoil][] = [
    ['no subject', 'mapping.columns', (m) => (m.columns[0]!.meaning = { as: 'leaveOut' })],
    [
      'two subjects',
      'mapping.columns.1.meaning',
      (m) => (m.columns[1]!.meaning = { as: 'subject' }),
    ],
    [
      'no data',
      'mapping.columns',
      (m) => [3, 4, 5, 6].map((n) => (m.columns[n]!.meaning = { as: 'leaveOut' })),
    ],
    [
      'an analyte of another study',
      'mapping.columns.3.meaning.analyteKey',
      (m) => (m.columns[3]!.meaning = { as: 'sensorValue', analyteKey: 'helium' }),
    ],
    [
      'a flag without its value',
      'mapping.columns.4.meaning.analyteKey',
      (m) => (m.columns[4]!.meaning = { as: 'belowLod', analyteKey: 'acetone' }),
    ],
    [
      'a word on two sides',
      'mapping.columns.6.meaning.absent',
      (m) =>
        (m.columns[6]!.meaning = {
          as: 'outcome',
          present: ['Yes'],
          absent: ['yes'],
          indeterminate: [],
        }),
    ],
    [
      'an outcome without words',
      'mapping.columns.6.meaning',
      (m) =>
        (m.columns[6]!.meaning = { as: 'outcome', present: [], absent: [], indeterminate: [] }),
    ],
    [
      'a suspicious column that nobody declared',
      'mapping.columns.7.declared',
      (m) => (m.columns[7]!.meaning = { as: 'covariate', key: 'name' }),
    ],
    [
      'a covariate key with capitals',
      'mapping.columns.7.meaning.key',
      (m) => (m.columns[7]!.meaning = { as: 'covariate', key: 'Name' }),
    ],
    ['two ages', 'mapping.columns.4.meaning', (m) => (m.columns[4]!.meaning = { as: 'ageBand' })],
    ['no site', 'mapping.siteId', (m) => (m.siteId = null)],
    [
      'a site of another study',
      'mapping.siteId',
      (m) =>
        (m.siteId = m.columns[0]!.name === 'id' ? '00000000-0000-4000-8000-000000000000' : null),
    ],
    ['other columns than the file has', 'mapping.columns', (m) => m.columns.pop()],
    [
      'no decimal sign',
      'mapping.format.decimal',
      (m) => ((m.format as { decimal?: string }).decimal = undefined),
    ],
  ]
  test.each(mistakes)('%s is refused at its place', async (_what, field, spoil) => {
    const { desk } = await studyWithLead(api)
    const of = await desk.uploaded(FILE)
    const mapping = desk.mappingFor(of, meant)
    spoil(mapping)
    const response = await desk.preview(of, mapping)
    expect(response.status).toBe(422)
    expect(Object.keys(response.body.fields)).toContain(field)
    expect(await desk.get(of.id)).toMatchObject({ state: 'uploaded', mapping: null, version: 1 })
  })

  test('a suspicious column comes in once somebody says what it holds', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(
      'id,nh3,name\nA1,250,alpha\n',
      { id: MEANINGS.id, nh3: MEANINGS.nh3, name: { as: 'covariate', key: 'sensor_model' } },
      { declared: { name: 'Model of the sensor' } },
    )
    expect((await desk.rows(of))[0]?.entry?.covariates).toEqual({ sensor_model: 'alpha' })
  })

  test('somebody who saw an older version is told so', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged('id,nh3\nA1,250\n', { id: MEANINGS.id, nh3: MEANINGS.nh3 })
    const response = await desk.client
      .post(`/api/imports/${of.id}/preview`)
      .send({ mapping: of.mapping, version: 1 })
    expect(response.status).toBe(409)
    expect(response.body.code).toBe('changed-meanwhile')
  })
})
