import { describe, expect, test } from 'vitest'
import { brierScore } from '#shared/statistics/panel/brierScore.ts'
import { calibrationOfProbabilities } from '#shared/statistics/panel/calibrationOfProbabilities.ts'
import { logisticRegression } from '#shared/statistics/panel/logisticRegression.ts'
import { panelArea } from '#shared/statistics/panel/panelArea.ts'
import { expectRefusal } from './support/refusal.ts'

const outcomes = [0, 0, 0, 1, 0, 1, 0, 1, 1, 1, 0, 1]
const gas = { name: 'gas', values: [1, 2, 3, 3, 4, 5, 6, 6, 7, 8, 8, 9] }
const other = { name: 'other', values: [3, 1, 4, 1, 5, 9, 2, 6, 5, 3, 5, 8] }

describe('logistic regression', () => {
  test('with one yes/no predictor is the two-by-two table', () => {
    // 8 of 10 exposed and 3 of 12 unexposed: odds ratio (8·9)/(2·3) = 12, variance 1/8+1/2+1/3+1/9
    const exposed = [...new Array<number>(10).fill(1), ...new Array<number>(12).fill(0)]
    const present = exposed.map((_, i) => (i < 8 || (i >= 10 && i < 13) ? 1 : 0))
    const { terms } = logisticRegression({
      predictors: [{ name: 'exposed', values: exposed }],
      outcomes: present,
    })
    expect(terms[1]!.oddsRatio).toBeCloseTo(12, 9)
    expect(terms[1]!.standardError ** 2).toBeCloseTo(1 / 8 + 1 / 2 + 1 / 3 + 1 / 9, 9)
    expect(terms[0]!.estimate).toBeCloseTo(Math.log(3 / 9), 9)
  })

  test('fits so that the mean probability is the share present', () => {
    const { fitted, nPresent, n } = logisticRegression({ predictors: [gas, other], outcomes })
    expect(fitted.reduce((a, b) => a + b, 0) / n).toBeCloseTo(nPresent / n, 10)
  })

  test('does not mind the units of a predictor', () => {
    const plain = logisticRegression({ predictors: [gas, other], outcomes })
    const ppm = { name: 'gas', values: gas.values.map((v) => 5000 + v / 1000) }
    const scaled = logisticRegression({ predictors: [ppm, other], outcomes })
    expect(scaled.logLikelihood).toBeCloseTo(plain.logLikelihood, 8)
    expect(scaled.terms[1]!.z).toBeCloseTo(plain.terms[1]!.z, 5)
    expect(scaled.terms[2]!.estimate).toBeCloseTo(plain.terms[2]!.estimate, 7)
  })

  test('refuses perfect and nearly perfect separation', () => {
    const apart = { name: 'gas', values: [1, 2, 3, 10, 11, 12] }
    const half = [0, 0, 0, 1, 1, 1]
    expectRefusal(() => logisticRegression({ predictors: [apart], outcomes: half }), 'separation')
    // one tied value keeps the likelihood below 1, and still no finite coefficient is best
    const touching = { name: 'gas', values: [1, 2, 3, 3, 4, 5] }
    expectRefusal(
      () => logisticRegression({ predictors: [touching], outcomes: half }),
      'separation',
    )
  })

  test('refuses what cannot be fitted, each with its own reason', () => {
    const twice = { name: 'twice', values: gas.values.map((v) => 2 * v) }
    const flat = { name: 'flat', values: gas.values.map(() => 4) }
    const ask =
      (predictors: (typeof gas)[], y: number[] = outcomes) =>
      () =>
        logisticRegression({ predictors, outcomes: y })
    expectRefusal(ask([gas, twice]), 'collinear')
    expectRefusal(ask([flat]), 'constant')
    expectRefusal(
      ask(
        [gas],
        outcomes.map(() => 1),
      ),
      'one-class',
    )
    expectRefusal(ask([gas], [0, 1, 1]), 'unequal-length')
    expectRefusal(ask([]), 'too-few')
    expectRefusal(
      ask([{ name: 'gas', values: [Number.NaN, ...gas.values.slice(1)] }]),
      'non-finite',
    )
  })
})

test('a panel whose samples cannot be fitted is refused rather than shown', () => {
  const near = { name: 'gas', values: [1, 2, 3, 5, 4, 6, 7, 8] }
  expectRefusal(
    () => panelArea({ predictors: [near], outcomes: [0, 0, 0, 0, 1, 1, 1, 1] }, { seed: 1 }),
    'no-convergence',
  )
})

describe('predicted probabilities', () => {
  test('have a Brier score of 0 when certain and right, and scaled 0 at the prevalence', () => {
    expect(brierScore([1, 0, 1], [1, 0, 1]).brier).toBe(0)
    expect(brierScore([0.5, 0.5], [1, 0])).toEqual({ brier: 0.25, scaled: 0 })
  })
  test('that are too extreme show a calibration slope below 1', () => {
    const { fitted } = logisticRegression({ predictors: [gas], outcomes })
    const extreme = fitted.map((p) => p ** 2 / (p ** 2 + (1 - p) ** 2))
    expect(calibrationOfProbabilities(extreme, outcomes).slope).toBeCloseTo(0.5, 6)
  })
  test('are refused where they are none', () => {
    expectRefusal(() => calibrationOfProbabilities([0, 0.5], [0, 1]), 'out-of-range')
    expectRefusal(() => brierScore([0.5], [1]), 'one-class')
    expectRefusal(() => brierScore([0.5], [1, 0]), 'unequal-length')
  })
})
