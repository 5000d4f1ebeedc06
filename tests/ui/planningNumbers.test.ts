import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { figures, worked } from '../support/plans.ts'

/** Values of R 4.2.2, pROC 1.18.0 and scipy: tests/statistics/references/SOURCES.md. */
const references: { quantity: string; value: Record<string, never> }[] = JSON.parse(
  readFileSync(new URL('../statistics/references/results/planning.json', import.meta.url), 'utf8'),
).records
const referencesOf = (quantity: string) => {
  const found = references.filter((record) => record.quantity === quantity)
  expect(found.length).toBeGreaterThan(0)
  return found.map(({ value }) => value as Record<string, number & Record<string, number>>)
}

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
