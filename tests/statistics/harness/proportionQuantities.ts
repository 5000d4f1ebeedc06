import { mcnemarTest } from '#shared/statistics/proportions/mcnemarTest.ts'
import { newcombeIndependent } from '#shared/statistics/proportions/newcombeIndependent.ts'
import { newcombePaired } from '#shared/statistics/proportions/newcombePaired.ts'
import { proportionEstimate } from '#shared/statistics/proportions/proportionEstimate.ts'
import { wilsonContinuityInterval } from '#shared/statistics/proportions/wilsonContinuityInterval.ts'
import type { Quantities } from './Quantity.ts'

export const proportionQuantities: Quantities = {
  proportion_ci95: ({ given }) => {
    const x = Number(given.x)
    const n = Number(given.n)
    const wilson = proportionEstimate(x, n)
    const exact = proportionEstimate(x, n, { interval: 'Clopper–Pearson' })
    return {
      x,
      n,
      estimate: wilson.estimate,
      wilson: { lower: wilson.lower, upper: wilson.upper },
      wilson_continuity: wilsonContinuityInterval(x, n),
      clopper_pearson: { lower: exact.lower, upper: exact.upper },
    }
  },
  newcombe_independent: ({ given }) => {
    const first = { numerator: Number(given.x1), denominator: Number(given.n1) }
    const second = { numerator: Number(given.x2), denominator: Number(given.n2) }
    const answer = newcombeIndependent(first, second)
    return {
      x1: first.numerator,
      n1: first.denominator,
      x2: second.numerator,
      n2: second.denominator,
      difference: answer.difference,
      newcombe_method_10: answer.method10,
      newcombe_method_11_continuity: answer.method11,
      wald: answer.wald,
    }
  },
  newcombe_paired: ({ given }) => {
    const counts = {
      bothPositive: Number(given.both_positive),
      firstOnly: Number(given.first_only),
      secondOnly: Number(given.second_only),
      bothNegative: Number(given.both_negative),
    }
    const answer = newcombePaired(counts)
    const mcnemar = mcnemarTest(counts)
    return {
      both_positive: counts.bothPositive,
      first_only: counts.firstOnly,
      second_only: counts.secondOnly,
      both_negative: counts.bothNegative,
      difference: answer.difference,
      newcombe_paired_method_8: answer.method8,
      newcombe_paired_method_10: answer.method10,
      mcnemar_exact_p: mcnemar.exactP,
      mcnemar_midp: mcnemar.midP,
      mcnemar_chi2: mcnemar.chiSquared,
      mcnemar_p: mcnemar.p,
      mcnemar_chi2_continuity: mcnemar.chiSquaredContinuity,
    }
  },
}
