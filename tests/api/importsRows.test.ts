import { readFileSync } from 'node:fs'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { analytes } from '#db/schema/analytes.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { subjects } from '#db/schema/subjects.ts'
import { type Api, startApi } from '../support/api.ts'
import { MEANINGS, studyWithLead } from '../support/imports.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const sample = (name: string) =>
  readFileSync(new URL(`../support/files/${name}`, import.meta.url), 'utf8')

/** Everything of a study that an import could have written. */
async function stored(study: { id: string }) {
  const of = { subjects, sessions, sessionValues, referenceMeasurements, referenceOutcomes }
  const found = await Promise.all(
    Object.entries(of).map(async ([name, table]) => [
      name,
      await api.fixtures.select().from(table).where(eq(table.studyId, study.id)),
    ]),
  )
  return Object.fromEntries(found) as {
    subjects: (typeof subjects.$inferSelect)[]
    sessions: (typeof sessions.$inferSelect)[]
    sessionValues: (typeof sessionValues.$inferSelect)[]
    referenceMeasurements: (typeof referenceMeasurements.$inferSelect)[]
    referenceOutcomes: (typeof referenceOutcomes.$inferSelect)[]
  }
}

const nothingStored = {
  subjects: [],
  sessions: [],
  sessionValues: [],
  referenceMeasurements: [],
  referenceOutcomes: [],
}

describe('the fate of each row', () => {
  const HEADINGS = 'id,visit,sex,age,nh3,low,ref,label,diet'
  const refused: [what: string, row: string, column: string, reason: RegExp][] = [
    ['a word for a number', 'A1,1,F,50,much,0,251,1,', 'nh3', /^Not a number\.$/],
    ['a number with a thousands separator', 'A1,1,F,50,"1,200",0,251,1,', 'nh3', /Not a number/],
    ['a comparison sign', 'A1,1,F,50,<250,0,251,1,', 'nh3', /limit of detection/],
    ['infinity', 'A1,1,F,50,1e999,0,251,1,', 'nh3', /Not a number/],
    ['a gas below 0', 'A1,1,F,50,-1,0,251,1,', 'nh3', /below 0/],
    ['a reference below 0', 'A1,1,F,50,250,0,-3,1,', 'ref', /below 0/],
    ['an unknown word for the outcome', 'A1,1,F,50,250,0,251,maybe,', 'label', /no outcome/],
    ['an unknown word for the sex', 'A1,1,q,50,250,0,251,1,', 'sex', /no sex/],
    ['an age out of range', 'A1,1,F,131,250,0,251,1,', 'age', /0 to 130/],
    ['an unreadable flag', 'A1,1,F,50,250,perhaps,251,1,', 'low', /yes nor no/],
    ['a value without its flag', 'A1,1,F,50,250,,251,1,', 'low', /flag is missing/],
    ['no subject', ',1,F,50,250,0,251,1,', 'id', /belongs to nobody/],
    ['no session number', 'A1,,F,50,250,0,251,1,', 'visit', /missing/],
    ['half a session', 'A1,1.5,F,50,250,0,251,1,', 'visit', /whole number/],
    ['too few cells', 'A1,1,F,50', '', /4 cells, the headings are 9/],
    ['too many cells', 'A1,1,F,50,250,0,251,1,,7', '', /10 cells/],
  ]
  test.each(refused)(
    '%s is refused with line, column and reason',
    async (_what, row, column, reason) => {
      const { study, desk } = await studyWithLead(api)
      const of = await desk.judged(`${HEADINGS}\n\n${row}\nB2,1,M,61,300,1,290,0,vegan\n`, MEANINGS)
      expect(of.counts).toMatchObject({ rows: 2, new: 1, refused: 1 })
      const [wrong, ...others] = await desk.rows(of, 'refused')
      expect(others).toEqual([])
      expect(wrong).toMatchObject({ line: 3, entry: null, problems: [{ column }] })
      expect(wrong!.problems[0]!.reason).toMatch(reason)
      expect(await stored(study)).toEqual(nothingStored)
    },
  )

  test('a right row is shown as it will be entered, blanks as missing values and never as 0', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(
      `${HEADINGS}\nA1,1,F,50,250,1,251.5,1,vegan\nB2,1,,,,,,,\n`,
      MEANINGS,
    )
    expect((await desk.rows(of, 'new')).map((row) => row.entry)).toEqual([
      {
        subjectWord: 'A1',
        siteId: study.north.id,
        sessionNumber: 1,
        sex: 'F',
        ageBand: '50-54',
        sensorValues: { ammonia: { value: 250, belowLod: true } },
        referenceValues: { ammonia: 251.5 },
        outcome: 'present',
        covariates: { diet: 'vegan' },
      },
      {
        subjectWord: 'B2',
        siteId: study.north.id,
        sessionNumber: 1,
        sex: null,
        ageBand: null,
        sensorValues: {},
        referenceValues: {},
        outcome: null,
        covariates: {},
      },
    ])
    expect(of.counts).toMatchObject({ outcomes: { present: 1, missing: 1 }, subjects: 2 })
  })

  test('a text that could identify somebody is refused even where its column as a whole looks harmless', async () => {
    const { desk } = await studyWithLead(api)
    const rows = ['vegan', 'vegan', 'mixed', '1950-02-01', 'mixed', '9876543210', 'x'.repeat(39)]
    const of = await desk.judged(
      `id,nh3,diet\n${rows.map((diet, n) => `A${n},250,${diet}`).join('\n')}\n`,
      { id: MEANINGS.id, nh3: MEANINGS.nh3, diet: MEANINGS.diet },
    )
    expect(
      (await desk.rows(of, 'refused')).map(({ line, problems }) => [line, problems[0]?.reason]),
    ).toEqual([
      [5, expect.stringMatching(/^This looks like dates, perhaps of birth\./)],
      [7, expect.stringMatching(/^This looks like record numbers\./)],
    ])
  })

  test('lines are counted as an editor shows them: blank lines, line breaks in cells, and any line end', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(
      'id,nh3,said\r\nA1,1,"two\r\nlines"\r\n\r\n,,\r\nA2,much,x\rA3,3,y',
      {
        id: MEANINGS.id,
        nh3: MEANINGS.nh3,
      },
    )
    expect((await desk.rows(of)).map(({ line, fate }) => [line, fate])).toEqual([
      [2, 'new'],
      [6, 'refused'],
      [7, 'new'],
    ])
  })

  test('a decimal comma is read as one when it was said, and only then', async () => {
    const { desk } = await studyWithLead(api)
    const file = 'id;nh3\nA1;250,5\n'
    const meanings = { id: MEANINGS.id, nh3: MEANINGS.nh3 }
    const of = await desk.judged(file, meanings, { format: { delimiter: ';', decimal: ',' } })
    expect((await desk.rows(of))[0]?.entry?.sensorValues).toEqual({
      ammonia: { value: 250.5, belowLod: false },
    })
    const again = await desk.preview(of, {
      ...desk.mappingFor(of, meanings),
      format: { delimiter: ';', decimal: '.' },
    })
    expect(again.status).toBe(202)
    await api.runJobs()
    expect((await desk.rows(of))[0]).toMatchObject({ fate: 'refused', entry: null })
  })

  test('a word of the site column that stands for no site is refused', async () => {
    const { study, desk } = await studyWithLead(api)
    const of = await desk.judged(
      'id,where,nh3\nA1,North,1\nA2,elsewhere,2\nA3,,3\n',
      { id: MEANINGS.id, nh3: MEANINGS.nh3, where: { as: 'site' } },
      { siteId: null, sitesByWord: { north: study.north.id } },
    )
    expect((await desk.rows(of)).map(({ line, problems }) => [line, problems[0]?.reason])).toEqual([
      [2, undefined],
      [3, 'This word stands for no site.'],
      [4, 'Without a site the row belongs nowhere.'],
    ])
  })

  test('an age that the file says is open goes into the open band, and older ones contradict that', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged('id,age,nh3\nA1,79,1\nA2,80,2\nA3,81,3\n', {
      id: MEANINGS.id,
      nh3: MEANINGS.nh3,
      age: { as: 'ageYears', andOver: 80 },
    })
    const rows = await desk.rows(of)
    expect(rows.map((row) => row.entry?.ageBand)).toEqual(['75-79', '80+', undefined])
    expect(rows[2]!.problems[0]!.reason).toMatch(/80 is said to stand for all older ages/)
  })

  test('a value below 0 of something that is no gas is a value', async () => {
    const { study, desk } = await studyWithLead(api)
    await api.fixtures.insert(analytes).values({
      id: '11111111-1111-4111-8111-111111111111',
      studyId: study.id,
      createdAt: new Date(),
      key: 'base_excess',
      name: 'Base excess',
      unit: 'mmol/L',
    })
    const of = await desk.judged('id,be\nA1,-2.5\n', {
      id: MEANINGS.id,
      be: { as: 'sensorValue', analyteKey: 'base_excess' },
    })
    expect(of.counts).toMatchObject({ new: 1, refused: 0 })
  })

  test('the same session of a subject on two lines refuses both', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged('id,visit,nh3\nA1,1,1\nA1,2,2\nA1,1,3\n', {
      id: MEANINGS.id,
      visit: MEANINGS.visit,
      nh3: MEANINGS.nh3,
    })
    expect((await desk.rows(of)).map(({ line, fate }) => [line, fate])).toEqual([
      [2, 'refused'],
      [3, 'new'],
      [4, 'refused'],
    ])
    expect((await desk.rows(of, 'refused'))[0]!.problems[0]).toMatchObject({
      column: 'visit',
      reason: 'Session 1 of this subject stands on several lines: lines 2, 4.',
    })
  })

  test('lines of a subject that contradict each other are all refused; a blank contradicts nothing', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(
      'id,sex,nh3,label\nA1,F,1,1\nA1,M,2,1\nB2,F,3,1\nB2,,4,\nC3,F,5,1\nC3,F,6,0\n',
      { id: MEANINGS.id, sex: MEANINGS.sex, nh3: MEANINGS.nh3, label: MEANINGS.label },
    )
    const rows = await desk.rows(of)
    expect(rows.map((row) => [row.line, row.problems.map((each) => each.column)])).toEqual([
      [2, ['sex']],
      [3, ['sex']],
      [4, []],
      [5, []],
      [6, ['label']],
      [7, ['label']],
    ])
    expect(rows[0]!.problems[0]!.reason).toBe(
      'The lines of this subject contradict each other: lines 2, 3.',
    )
  })

  test('the counts say how many rows each reason refuses', async () => {
    const { desk } = await studyWithLead(api)
    const of = await desk.judged(
      sample('invented-messy.csv'),
      {
        participant: { as: 'subject' },
        visit: { as: 'sessionNumber' },
        age: MEANINGS.age,
        'NH3 breath ppb': { as: 'sensorValue', analyteKey: 'ammonia' },
        fibrosis: { as: 'outcome', present: ['yes'], absent: ['no'], indeterminate: [] },
      },
      { format: { delimiter: ';', decimal: ',' } },
    )
    expect(of.counts?.problems).toEqual(
      expect.arrayContaining([
        { column: 'fibrosis', reason: 'This word stands for no outcome.', rows: 1 },
        { column: 'age', reason: 'Not an age from 0 to 130 years.', rows: 1 },
        { column: 'NH3 breath ppb', reason: 'A concentration cannot be below 0.', rows: 1 },
      ]),
    )
    expect(of.counts?.refused).toBe(5)
  })
})
