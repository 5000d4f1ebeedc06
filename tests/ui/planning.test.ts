import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { enrolment } from '../../src/features/planning/enrolment.ts'
import { addressOf, textsFromAddress } from '../../src/features/planning/planAddress.ts'
import { PLAN_PARTS, planQuestionAt } from '../../src/features/planning/planParts.ts'
import {
  attemptPlan,
  type PlanQuestion,
  type PlanWork,
} from '../../src/features/planning/planQuestion.ts'
import { protocolWords } from '../../src/features/planning/protocolWords.ts'

/** Values of R 4.2.2, pROC 1.18.0 and scipy: tests/statistics/references/SOURCES.md. */
const references: { quantity: string; value: Record<string, never> }[] = JSON.parse(
  readFileSync(new URL('../statistics/references/results/planning.json', import.meta.url), 'utf8'),
).records
const referencesOf = (quantity: string) => {
  const found = references.filter((record) => record.quantity === quantity)
  expect(found.length).toBeGreaterThan(0)
  return found.map(({ value }) => value as Record<string, number & Record<string, number>>)
}

const everyQuestion = PLAN_PARTS.flatMap(({ key, questions }) =>
  questions.map((question) => [`${key}/${question.ask}`, question] as const),
)

/** What the page shows for what is typed; a number for every box that is named. */
function worked(address: string, typed: Record<string, number | string> = {}): PlanWork {
  const question = questionAt(address)
  const outcome = outcomeOf(question, typed)
  expect(outcome.problems).toBeNull()
  return outcome.work!
}

function outcomeOf(question: PlanQuestion, typed: Record<string, number | string>) {
  const texts = Object.fromEntries(Object.entries(typed).map(([name, each]) => [name, `${each}`]))
  const { values, problems } = question.judge(texts)
  return values ? attemptPlan(question, values) : { work: null, problems }
}

function questionAt(address: string): PlanQuestion {
  const [part, ask] = address.split('/')
  return planQuestionAt(part!, ask!)!
}

const figures = (work: PlanWork) => work.answer.figures.map(({ value }) => value)

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

describe('numbers on the page are those of the references', () => {
  test('an area against a floor (Hanley & McNeil 1982, Obuchowski 2004)', () => {
    for (const value of referencesOf('auc_sample_size')) {
      const work = worked('area/floor', {
        expected: value.auc_alternative!,
        floor: value.auc_null!,
        power: value.power!,
        absentPerPresent: value.controls_per_case!,
      })
      const finite = value.hanley_mcneil_finite!
      expect(figures(work).slice(0, 2)).toEqual([`${finite.cases}`, `${finite.controls}`])
      expect(work.answer.table.rows.map((cells) => cells[1])).toEqual([
        `${finite.cases}`,
        `${value.hanley_mcneil_asymptotic!.cases}`,
        `${value.obuchowski_binormal!.cases}`,
      ])
    }
  })

  test('the power of a smaller study', () => {
    for (const value of referencesOf('auc_power')) {
      const work = worked('area/floor', {
        expected: value.auc_alternative!,
        floor: value.auc_null!,
        reach: value.cases!,
        absentPerPresent: value.controls! / value.cases!,
      })
      expect(work.answer.notes.join(' ')).toContain(`the power is ${value.power!.toFixed(3)}.`)
    }
  })

  test('an area above chance (Obuchowski 2004)', () => {
    for (const value of referencesOf('auc_sample_size_vs_half')) {
      const work = worked('area/half', {
        expected: value.auc!,
        power: value.power!,
        alpha: value.alpha_two_sided!,
        absentPerPresent: value.controls_per_case!,
      })
      const row = work.answer.table.rows.at(-1)!
      expect(row.slice(1, 3)).toEqual([`${value.cases}`, `${value.controls}`])
    }
  })

  test('an area to a precision (Hanley & McNeil 1982)', () => {
    for (const value of referencesOf('auc_precision')) {
      const work = worked('area/precision', {
        area: value.auc!,
        halfWidth: value.half_width!,
        absentPerPresent: value.controls_per_case!,
      })
      expect(figures(work)[0]).toBe(`${value.cases}`)
      expect(work.answer.notes[0]).toContain(value.achieved_half_width!.toFixed(3))
    }
  })

  test('sensitivity and specificity to a precision (Buderer 1996)', () => {
    for (const value of referencesOf('buderer')) {
      const work = worked('cut-off/precision', {
        sensitivity: value.sensitivity!,
        sensitivityHalfWidth: value.se_half_width!,
        specificity: value.specificity!,
        specificityHalfWidth: value.sp_half_width!,
        prevalence: value.prevalence!,
      })
      expect(figures(work).slice(0, 2)).toEqual([`${value.cases}`, `${value.controls}`])
      expect(work.answer.table.rows.map((cells) => cells[3])).toEqual([
        `${value.n_for_sensitivity_rounded_cases}`,
        `${value.n_for_specificity_rounded_controls}`,
      ])
    }
  })

  test('limits of agreement: 100 pairs place a limit to ±0.34 SD (Bland & Altman 1986)', () => {
    expect(figures(worked('agreement/limits', { sd: 1, halfWidth: 0.34 }))[0]).toBe('100')
  })

  test('a floor of sensitivity (scipy: tests/statistics/references/floor_sample_size.py)', () => {
    const work = worked('cut-off/floors', { sensitivity: 0.9, sensitivityFloor: 0.8 })
    expect(figures(work)[0]).toBe('142')
    expect(work.answer.table.rows[0]).toEqual([
      'Sensitivity, Wilson',
      '142',
      '123/142',
      '0.926',
      '130',
    ])
  })

  test('two independent proportions: 56/70 and 48/80 (Newcombe 1998, Stat Med 17:873, table II a)', () => {
    const work = worked('two-tests/different')
    expect(figures(work).slice(0, 2)).toEqual(['0.200', '0.052 to 0.334'])
    expect(work.answer.table.rows[1]![1]).toBe('0.043 to 0.342')
  })

  test('noise and replicates move the area (normal values in closed form)', () => {
    // Δ = 100, SD 60 and 40, error 30: 0.917241 without noise, 0.884001, 0.899792, 0.905419 for 1, 2, 3
    const work = worked('noise/noise')
    expect(figures(work).slice(0, 2)).toEqual(['0.917', '0.905'])
    expect(work.answer.table.rows.slice(0, 3).map((cells) => cells[1])).toEqual([
      '0.884',
      '0.900',
      '0.905',
    ])
  })

  test('replicates for a reliability, and an area freed of noise (Spearman–Brown; Reiser 2000)', () => {
    // 0.7 → 0.9 takes 3.857, so 4; an area seen as 0.8 at reliability 0.7 is 0.842775
    expect(figures(worked('noise/replicates'))).toEqual(['4', '3.857'])
    expect(figures(worked('noise/corrected'))).toEqual(['0.800', '0.843'])
  })

  test('values below the limit of detection (Δ = 1.5 SD: 0.849305 tied and 0.784418 dropped at the median)', () => {
    const work = worked('noise/detection', {
      meanPresent: 1.5,
      meanAbsent: 0,
      sdPresent: 1,
      sdAbsent: 1,
      limit: 0,
    })
    expect(figures(work)).toEqual(['0.849', '6.7 %', '50.0 %'])
    expect(work.answer.notes[0]).toContain('0.784')
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
