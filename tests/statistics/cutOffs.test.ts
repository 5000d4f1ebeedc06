import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { accuracyAtCutOff } from '#shared/statistics/cutOffs/accuracyAtCutOff.ts'
import { chosenPoint } from '#shared/statistics/cutOffs/chosenPoint.ts'
import { cutOffRules } from '#shared/statistics/cutOffs/cutOffRules.ts'
import { cutOffsWithAtLeast } from '#shared/statistics/cutOffs/cutOffsWithAtLeast.ts'
import { netBenefit } from '#shared/statistics/cutOffs/netBenefit.ts'
import { observedPredictiveValues } from '#shared/statistics/cutOffs/observedPredictiveValues.ts'
import { predictiveValuesAtPrevalence } from '#shared/statistics/cutOffs/predictiveValuesAtPrevalence.ts'
import { referenceIndeterminates } from '#shared/statistics/cutOffs/referenceIndeterminates.ts'
import { subgroupAccuracy } from '#shared/statistics/cutOffs/subgroupAccuracy.ts'
import { twoByTwo } from '#shared/statistics/cutOffs/twoByTwo.ts'
import { withIndeterminates } from '#shared/statistics/cutOffs/withIndeterminates.ts'
import { someClasses, someTable, tinyClasses } from './support/arbitraries.ts'
import { everyNumber } from './support/everyNumber.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

const table = { truePositives: 26, falsePositives: 12, falseNegatives: 15, trueNegatives: 60 }

describe('cut-offs chosen by a rule', () => {
  test('lie on the curve: their counts are those of the two-by-two table there', () => {
    holdsForAll(tinyClasses, (classes) => {
      const rules = cutOffRules(rocCurve(classes))
      const points = [
        ...rules.youden.cutOffs,
        ...rules.closestToCorner.cutOffs,
        ...rules.sensitivityAtLeast.cutOffs,
        ...rules.specificityAtLeast.cutOffs,
      ]
      for (const point of points) {
        const { truePositives, falsePositives, falseNegatives, trueNegatives, threshold } = point
        const counts = { truePositives, falsePositives, falseNegatives, trueNegatives }
        if (threshold === null) expect(truePositives + falsePositives).toBe(0)
        else expect(counts).toEqual(twoByTwo(classes, threshold))
      }
    })
  })

  test('list every tie and nothing else', () => {
    holdsForAll(tinyClasses, (classes) => {
      const curve = rocCurve(classes)
      const { youden } = cutOffRules(curve)
      const indexAt = (k: number) =>
        curve.truePositives[k]! * curve.nAbsent - curve.falsePositives[k]! * curve.nPresent
      const all = Array.from(curve.truePositives, (_, k) => indexAt(k))
      const best = Math.max(...all)
      expect(youden.cutOffs.map((point) => point.point)).toEqual(
        all.flatMap((value, k) => (value === best ? [k] : [])),
      )
    })
  })

  test('keep the least sensitivity and specificity asked for, and the light form agrees', () => {
    holdsForAll(fc.tuple(someClasses, fc.constantFrom(0.5, 0.8, 0.9, 0.95)), ([classes, least]) => {
      const curve = rocCurve(classes)
      const sensitive = cutOffsWithAtLeast(curve, 'sensitivity', least)
      const specific = cutOffsWithAtLeast(curve, 'specificity', least)
      expect(sensitive.preferred.sensitivity).toBeGreaterThanOrEqual(least - 1e-9)
      expect(specific.preferred.specificity).toBeGreaterThanOrEqual(least - 1e-9)
      const light = chosenPoint(curve, { kind: 'sensitivityAtLeast', least })
      expect(light).toBe(sensitive.cutOffs[0]!.point)
    })
  })

  test('count 81 of 90 as a sensitivity of 0.9 in spite of rounding', () => {
    const present = [...new Array<number>(81).fill(2), ...new Array<number>(9).fill(0)]
    const curve = rocCurve({ present, absent: [0, 1, 1], direction: 'higher' })
    expect(cutOffsWithAtLeast(curve, 'sensitivity', 0.9).preferred.truePositives).toBe(81)
  })
})

describe('a two-by-two table', () => {
  test('gives no NaN and no infinity, whatever its cells', () => {
    holdsForAll(someTable, (cells) => {
      const numbers = everyNumber([
        accuracyAtCutOff(cells),
        accuracyAtCutOff(cells, { interval: 'Clopper–Pearson' }),
      ])
      expect(numbers.filter(({ value }) => !Number.isFinite(value))).toEqual([])
    })
  })

  test('gives a reason wherever a figure has no value', () => {
    const empty = accuracyAtCutOff({
      truePositives: 5,
      falsePositives: 0,
      falseNegatives: 0,
      trueNegatives: 7,
    })
    expect(empty.likelihoodRatioPositive).toMatchObject({
      estimate: null,
      notDefined: { code: 'unbounded' },
    })
    expect(empty.likelihoodRatioNegative).toMatchObject({
      estimate: 0,
      lower: null,
      notDefined: { code: 'zero-cell' },
    })
    expect(empty.diagnosticOddsRatio.notDefined?.code).toBe('unbounded')
    expect(empty.diagnosticOddsRatioHalfAdded.estimate).toBeCloseTo(165, 10)
    const nobody = accuracyAtCutOff({
      truePositives: 0,
      falsePositives: 0,
      falseNegatives: 3,
      trueNegatives: 4,
    })
    expect(nobody.positivePredictiveValue).toMatchObject({
      denominator: 0,
      estimate: null,
      notDefined: { code: 'zero-denominator' },
    })
  })

  // Newcombe 1998, Stat Med 17:857, table I (81/263 and 0/20), figures from memory of the paper
  test('meets Newcombe’s printed intervals for single proportions', () => {
    const se = accuracyAtCutOff({
      truePositives: 81,
      falsePositives: 20,
      falseNegatives: 182,
      trueNegatives: 0,
    })
    expect(se.sensitivity.lower).toBeCloseTo(0.2553, 4)
    expect(se.sensitivity.upper).toBeCloseTo(0.3662, 4)
    expect(se.specificity.lower).toBe(0)
    expect(se.specificity.upper).toBeCloseTo(0.1611, 4)
  })

  test('at the prevalence of its own cohort implies its observed predictive values', () => {
    const { positive, negative } = predictiveValuesAtPrevalence(table, 41 / 113)
    expect(positive.estimate).toBeCloseTo(26 / 38, 12)
    expect(negative.estimate).toBeCloseTo(60 / 75, 12)
  })

  test('hides observed predictive values where subjects were sampled by outcome', () => {
    expect(observedPredictiveValues(table, 'byOutcome')).toMatchObject({ shown: false })
    expect(observedPredictiveValues(table, 'cohort')).toMatchObject({
      shown: true,
      positive: { numerator: 26, denominator: 38 },
    })
  })

  test('refuses counts that are none, and a prevalence of 0 or 1', () => {
    expectRefusal(() => accuracyAtCutOff({ ...table, truePositives: 1.5 }), 'out-of-range')
    expectRefusal(() => accuracyAtCutOff({ ...table, falsePositives: -1 }), 'out-of-range')
    expectRefusal(() => predictiveValuesAtPrevalence(table, 0), 'out-of-range')
    expectRefusal(() => predictiveValuesAtPrevalence(table, 1), 'out-of-range')
    const oneClass = { ...table, truePositives: 0, falseNegatives: 0 }
    expectRefusal(() => predictiveValuesAtPrevalence(oneClass, 0.1), 'one-class')
    expectRefusal(() => twoByTwo({ present: [], absent: [], direction: 'higher' }, 1), 'too-few')
    expectRefusal(
      () => twoByTwo({ present: [1], absent: [2], direction: 'higher' }, Number.NaN),
      'non-finite',
    )
  })
})

describe('results that are no clear result', () => {
  test('indeterminate index results count once as positive, once as negative, and in the denominators', () => {
    const answer = withIndeterminates(table, {
      indeterminatePresent: 4,
      indeterminateAbsent: 6,
      noValidPresent: 1,
      noValidAbsent: 2,
    })
    expect(answer.countedPositive.sensitivity).toMatchObject({ numerator: 30, denominator: 45 })
    expect(answer.countedNegative.sensitivity).toMatchObject({ numerator: 26, denominator: 45 })
    expect(answer.countedPositive.specificity).toMatchObject({ numerator: 60, denominator: 78 })
    expect(answer.countedNegative.specificity).toMatchObject({ numerator: 66, denominator: 78 })
    expect(answer.determinate).toMatchObject({ numerator: 113, denominator: 126 })
    expect(answer.valid).toMatchObject({ numerator: 123, denominator: 126 })
  })

  test('indeterminate references bound accuracy from below and above', () => {
    const answer = referenceIndeterminates(table, { indexPositive: 5, indexNegative: 3 })
    expect(answer.worst.sensitivity).toMatchObject({ numerator: 26, denominator: 44 })
    expect(answer.best.sensitivity).toMatchObject({ numerator: 31, denominator: 46 })
    const { worst, leftOut, best } = answer
    expect(worst.accuracy.estimate).toBeLessThan(leftOut.accuracy.estimate!)
    expect(best.accuracy.estimate).toBeGreaterThan(leftOut.accuracy.estimate!)
  })
})

describe('subgroups', () => {
  test('with fewer than ten in a class show counts and no area', () => {
    const values = [0, 1, 2].flatMap((k) =>
      Array.from({ length: 12 }, (_, i) => ({
        value: (i * 7) % 12,
        present: i % 2 === 0,
        subgroup: k < 2 ? 'many' : 'few',
      })),
    )
    const [few, many] = subgroupAccuracy(values, { direction: 'higher', cutOff: 6 })
    expect(few).toMatchObject({ subgroup: 'few', nPresent: 6, nAbsent: 6, area: null })
    expect(many).toMatchObject({ subgroup: 'many', nPresent: 12, nAbsent: 12 })
    expect(many!.area).not.toBeNull()
    expect(few!.atCutOff.sensitivity.denominator).toBe(6)
  })
})

describe('net benefit', () => {
  test('of acting on all equals that of a threshold below every probability', () => {
    const [first] = netBenefit({ present: [0.6, 0.8], absent: [0.2, 0.3, 0.9] }, [0.1])
    expect(first!.netBenefit).toBeCloseTo(first!.treatAll, 14)
  })
  test('refuses thresholds of 0 and 1 and a single class', () => {
    expectRefusal(() => netBenefit({ present: [0.5], absent: [0.5] }, [1]), 'out-of-range')
    expectRefusal(() => netBenefit({ present: [0.5], absent: [] }, [0.1]), 'one-class')
  })
})
