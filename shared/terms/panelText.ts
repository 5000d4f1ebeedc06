import {
  formatCount,
  formatEstimate,
  formatInterval,
  formatProbability,
  NOT_ESTIMABLE,
} from './numbers.ts'

type Term = {
  term: string
  estimate: number
  lower: number
  upper: number
  standardError: number
  p: number
  oddsRatio: number | null
  oddsRatioLower: number | null
  oddsRatioUpper: number | null
}

/** So many decimals that the standard error shows three digits. */
const decimalsOf = (error: number): number =>
  Math.min(8, Math.max(0, 2 - Math.floor(Math.log10(error))))

/** How a coefficient is written: one wording for the screen and the printed page. */
export function panelTermTexts(term: Term) {
  const decimals = decimalsOf(term.standardError)
  const { oddsRatio, oddsRatioLower, oddsRatioUpper } = term
  // The odds where every value is 0 mean nothing for a concentration.
  const isIntercept = term.term === '(Intercept)'
  const oddsDecimals = oddsRatio !== null && Math.abs(oddsRatio - 1) < 0.1 ? 5 : 2
  return {
    estimate: formatEstimate(term.estimate, decimals),
    interval: formatInterval(term.lower, term.upper, decimals),
    oddsRatio: isIntercept
      ? ''
      : oddsRatio === null
        ? NOT_ESTIMABLE
        : formatEstimate(oddsRatio, oddsDecimals),
    oddsInterval:
      isIntercept || oddsRatioLower === null
        ? ''
        : formatInterval(oddsRatioLower, oddsRatioUpper, oddsDecimals),
    p: formatProbability(term.p),
  }
}

type Area = { apparent: number; method: string; replicates: number; failed: number; seed: number }

/** How the corrected area came about, with the apparent one beside it and never alone. */
export function panelAreaNote({ apparent, method, replicates, failed, seed }: Area): string {
  const kind = method.startsWith('cross') ? 'repeats' : 'samples'
  const lost =
    failed > 0 ? ` ${formatCount(failed)} of them could not be fitted and are left out.` : ''
  return `Corrected for having been fitted to the same subjects: ${method}, ${formatCount(replicates)} ${kind}, seed ${seed}.${lost} As fitted it is ${formatEstimate(apparent)}, which flatters the panel. No interval is given for a corrected area.`
}
