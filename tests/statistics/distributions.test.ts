import { describe, expect, test } from 'vitest'
import { betaQuantile } from '#shared/statistics/distributions/betaQuantile.ts'
import { chiSquaredQuantile } from '#shared/statistics/distributions/chiSquaredQuantile.ts'
import { fairBinomial } from '#shared/statistics/distributions/fairBinomial.ts'
import { fQuantile } from '#shared/statistics/distributions/fQuantile.ts'
import { fUpperTail } from '#shared/statistics/distributions/fUpperTail.ts'
import { gaussLegendre } from '#shared/statistics/distributions/gaussLegendre.ts'
import { noncentralTQuantile } from '#shared/statistics/distributions/noncentralTQuantile.ts'
import { normalQuantile } from '#shared/statistics/distributions/normalQuantile.ts'
import { normalTwoSided } from '#shared/statistics/distributions/normalTwoSided.ts'
import { studentTQuantile } from '#shared/statistics/distributions/studentTQuantile.ts'
import { studentTTwoSided } from '#shared/statistics/distributions/studentTTwoSided.ts'
import { expectRefusal } from './support/refusal.ts'

/** Relative difference. */
function off(actual: number, expected: number): number {
  return Math.abs(actual - expected) / Math.abs(expected)
}

// every expected value here: scipy 1.17.1 (scipy.stats), printed with 16 digits
describe('distributions agree with scipy', () => {
  test('the normal quantile and its tails, far out too', () => {
    expect(off(normalQuantile(0.975), 1.959963984540054)).toBeLessThan(1e-15)
    expect(off(normalQuantile(1e-20), -9.26234008979841)).toBeLessThan(1e-14)
    expect(off(normalQuantile(1e-300), -37.0470962993612)).toBeLessThan(1e-14)
    expect(off(normalTwoSided(1.5), 0.133614402537716)).toBeLessThan(1e-13)
    // mpmath 1.3.0, erfc with 30 digits
    expect(off(normalTwoSided(30), 9.813427854296374e-198)).toBeLessThan(1e-11)
    expect(normalTwoSided(0)).toBe(1)
  })

  test('Student’s t at the 4e-9 where jStat alone is off', () => {
    expect(off(studentTQuantile(0.975, 1), 12.706204736174694)).toBeLessThan(1e-13)
    expect(off(studentTQuantile(0.975, 2), 4.302652729749462)).toBeLessThan(1e-13)
    expect(off(studentTQuantile(0.975, 16), 2.1199052992212533)).toBeLessThan(1e-13)
    expect(off(studentTTwoSided(8.6, 10000), 9.167180665066327e-18)).toBeLessThan(1e-12)
  })

  test('chi-squared, F and beta', () => {
    expect(off(chiSquaredQuantile(0.025, 1), 0.0009820691171752555)).toBeLessThan(1e-12)
    expect(off(chiSquaredQuantile(0.025, 17), 7.564186449577569)).toBeLessThan(1e-12)
    expect(off(fQuantile(0.025, 1000, 3), 0.3195730057834541)).toBeLessThan(1e-12)
    expect(off(fUpperTail(1.5, 3, 100000), 0.21229731157800888)).toBeLessThan(1e-12)
    expect(off(betaQuantile(0.975, 1, 1e6), 3.688872650206488e-6)).toBeLessThan(1e-10)
    expect(off(betaQuantile(0.5, 1, 1e6), 6.931469403334938e-7)).toBeLessThan(1e-12)
  })

  test('noncentral t, from 2 to 99,999 degrees of freedom', () => {
    const factor = (p: number, n: number) =>
      noncentralTQuantile(p, n - 1, 1.959963984540054 * Math.sqrt(n)) / Math.sqrt(n)
    expect(off(factor(0.025, 3), 0.7126470461442106)).toBeLessThan(1e-11)
    expect(off(factor(0.975, 3), 12.8161972728683)).toBeLessThan(1e-11)
    expect(off(factor(0.025, 1000), 1.8578000161090917)).toBeLessThan(1e-10)
    expect(off(factor(0.975, 100000), 1.9705960628228236)).toBeLessThan(1e-9)
  })

  test('a fair binomial, by hand', () => {
    expect(fairBinomial(2, 4).cdf).toBeCloseTo(11 / 16, 14)
    expect(fairBinomial(2, 4).mass).toBeCloseTo(6 / 16, 14)
    expect(fairBinomial(0, 3)).toEqual({ cdf: expect.closeTo(1 / 8, 14), mass: 1 / 8 })
    expect(fairBinomial(3, 3)).toEqual({ cdf: 1, mass: 1 / 8 })
  })

  test('Gauss–Legendre integrates polynomials of degree 2n − 1 exactly', () => {
    const integral = gaussLegendre(5).reduce((sum, { node, weight }) => sum + weight * node ** 8, 0)
    expect(integral).toBeCloseTo(2 / 9, 14)
  })
})

test('a probability of 0, 1 or nothing at all is refused', () => {
  for (const p of [0, 1, -0.1, Number.NaN]) {
    expectRefusal(() => normalQuantile(p), 'out-of-range')
    expectRefusal(() => studentTQuantile(p, 5), 'out-of-range')
    expectRefusal(() => betaQuantile(p, 2, 2), 'out-of-range')
    expectRefusal(() => chiSquaredQuantile(p, 2), 'out-of-range')
  }
})
