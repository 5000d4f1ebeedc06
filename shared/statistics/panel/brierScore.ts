import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type BrierScore = {
  brier: number
  /** 1 − Brier/(prevalence·(1 − prevalence)); 0 = no better than the prevalence itself. */
  scaled: number
}

/**
 * Mean squared error of predicted probabilities.
 * @param probabilities 0…1  @param outcomes 1/true = present, both classes there
 * @throws StatisticsError 'unequal-length', 'one-class', 'non-finite'
 * Source: Brier 1950, Mon Weather Rev 78:1; scaled Steyerberg et al 2010, Epidemiology 21:128.
 */
export function brierScore(
  probabilities: ArrayLike<number>,
  outcomes: ArrayLike<boolean | number>,
): BrierScore {
  const n = probabilities.length
  if (outcomes.length !== n) {
    throw new StatisticsError('unequal-length', 'Each probability needs its outcome.')
  }
  requireFinite(probabilities, 'The probabilities')
  let squares = 0
  let present = 0
  for (let i = 0; i < n; i++) {
    const y = outcomes[i] ? 1 : 0
    present += y
    squares += (y - probabilities[i]!) ** 2
  }
  if (present === 0 || present === n) {
    throw new StatisticsError('one-class', 'Both reference outcomes are needed.')
  }
  const prevalence = present / n
  const brier = squares / n
  return { brier, scaled: 1 - brier / (prevalence * (1 - prevalence)) }
}
