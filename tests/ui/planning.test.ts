import { describe, expect, test } from 'vitest'
import { enrolment } from '../../src/features/planning/enrolment.ts'
import { addressOf, textsFromAddress } from '../../src/features/planning/planAddress.ts'
import { PLAN_PARTS } from '../../src/features/planning/planParts.ts'
import { protocolWords } from '../../src/features/planning/protocolWords.ts'
import { figures, outcomeOf, questionAt, worked } from '../support/plans.ts'

const everyQuestion = PLAN_PARTS.flatMap(({ key, questions }) =>
  questions.map((question) => [`${key}/${question.ask}`, question] as const),
)

describe.each(everyQuestion)('the question %s', (_, question) => {
  const { work } = outcomeOf(question, {})

  test('is answered as it stands, with a sentence, figures and a table', () => {
    expect(work!.answer.sentence).toMatch(/^[A-Z].*\d.*\.$/)
    expect(work!.answer.figures.length).toBeGreaterThan(1)
    const { columns, rows } = work!.answer.table
    expect(rows.length).toBeGreaterThan(0)
    for (const cells of rows) expect(cells).toHaveLength(columns.length)
    expect(JSON.stringify(work)).not.toMatch(/NaN|undefined|infinite/)
  })

  test('has a curve that runs through its plan', () => {
    const { lines, mark } = work!.curve
    const points = lines[0]!.points.filter((point) => point.y !== null)
    const [before, after] = [
      points.findLast((point) => point.x <= mark!.x)!,
      points.find((point) => point.x >= mark!.x)!,
    ]
    const [least, most] = [before.y!, after.y!].sort((a, b) => a - b)
    // A count may be a subject off between two points of the curve.
    expect(mark!.y).toBeGreaterThanOrEqual(least! - 1)
    expect(mark!.y).toBeLessThanOrEqual(most! + 1)
  })

  test('keeps its numbers in the address and reads them back', () => {
    const names = Object.keys(question.entries)
    const texts = Object.fromEntries(names.map((name, at) => [name, `${at + 1}.5`]))
    const search = new URLSearchParams(addressOf(question, texts))
    expect(search.get('ask')).toBe(question.ask)
    expect(textsFromAddress(question, search)).toEqual(texts)
    expect(textsFromAddress(question, new URLSearchParams())).toEqual(
      Object.fromEntries(names.map((name) => [name, question.entries[name]!.start])),
    )
  })

  test('refuses what is no number, and a blank box that is needed, at the box', () => {
    for (const [name, { optional }] of Object.entries(question.entries)) {
      expect(outcomeOf(question, { [name]: '0,9' }).problems).toHaveProperty(name)
      const blank = outcomeOf(question, { [name]: ' ' }).problems
      if (optional) expect(blank).toBeNull()
      else expect(blank?.[name]).toMatch(/^Give a number, such as /)
    }
  })

  test('says for the protocol what was assumed, by which method, from which source', () => {
    const words = protocolWords(question, {}, work!.answer)
    expect(words).toContain(work!.answer.sentence)
    for (const { label, start } of Object.values(question.entries))
      if (start !== '') expect(words).toContain(`${label} = ${start}`)
    expect(words).toMatch(/Methods: .+\(.+ (19|20)\d\d/)
  })
})

test('two areas are compared with the variances of the pilot, and give back its power', () => {
  const size = figures(worked('two-areas/pilot', { power: 0.9 }))
  const again = worked('two-areas/pilot', { power: 0.9, reach: size[0]! })
  const power = Number(/the power is ([\d.]+)\./.exec(again.answer.notes[0]!)![1])
  expect(power).toBeGreaterThanOrEqual(0.9)
  expect(power).toBeLessThan(0.92)
})

test('the same subjects need fewer than different ones, and the more alike the areas the fewer', () => {
  const needed = (address: string, typed = {}) => Number(figures(worked(address, typed))[0])
  const without = needed('two-areas/same', { correlation: 0 })
  expect(needed('two-areas/different')).toBe(without)
  expect(needed('two-areas/same', { correlation: 0.5 })).toBeLessThan(without)
  expect(needed('two-areas/same', { correlation: 0.7 })).toBeLessThan(
    needed('two-areas/same', { correlation: 0.5 }),
  )
})

test('enrolment fills the class that takes longer and makes up for losses', () => {
  const needed = { present: 30, absent: 70 }
  const none = { prevalence: undefined, withoutResult: undefined }
  expect(enrolment(needed, none)).toEqual({ present: 30, absent: 70, total: 100 })
  expect(enrolment(needed, { ...none, prevalence: 0.3 }).total).toBe(100)
  expect(enrolment(needed, { ...none, prevalence: 0.1 }).total).toBe(300)
  expect(enrolment(needed, { prevalence: 0.1, withoutResult: 25 }).total).toBe(400)
  expect(enrolment(needed, { ...none, withoutResult: 25 })).toEqual({
    present: 40,
    absent: 94,
    total: 134,
  })
})

describe('numbers that do not go together are refused at the box to change', () => {
  test.each([
    ['area/floor', { floor: 0.8 }, 'floor', /below the expected area/],
    ['area/floor', { floor: 0.7999999 }, 'expected', /further from each other/],
    ['area/half', { expected: 0.5 }, 'expected', /chance itself/],
    ['area/floor', { expected: 1 }, 'expected', /below 1/],
    ['two-areas/same', { area2: 0.75 }, 'area2', /no difference to find/],
    ['two-areas/pilot', { covariance: 0.0031 }, 'covariance', /below the variance/],
    ['cut-off/floors', { specificityFloor: 0.9 }, 'specificityFloor', /Lower it/],
    ['cut-off/floors', { sensitivityFloor: 0.8999 }, 'sensitivityFloor', /further from each other/],
    ['two-tests/different', { positives1: 71 }, 'positives1', /More positives than subjects/],
    [
      'two-tests/same',
      { bothPositive: 0, firstOnly: 0, secondOnly: 0, bothNegative: 0 },
      'bothPositive',
      /No subject is counted/,
    ],
    ['agreement/limits', { sd: 0 }, 'sd', /Above 0/],
    ['noise/noise', { replicates: 2.5 }, 'replicates', /whole number/],
    ['noise/variances', { errorVariance: 3500 }, 'errorVariance', /More error than was seen/],
    ['noise/detection', { limit: 1000 }, 'limit', /Lower it/],
  ] as const)('%s with %o', (address, typed, name, sentence) => {
    const { work, problems } = outcomeOf(questionAt(address), typed)
    expect(work).toBeNull()
    expect(problems?.[name]).toMatch(sentence)
  })
})
