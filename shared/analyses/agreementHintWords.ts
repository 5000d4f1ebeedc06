import type { AgreementFigures } from '#shared/schemas/agreement.ts'
import { formatConcentration, formatEstimate, formatProbability } from '#shared/terms/numbers.ts'

/** Below this a hint is put as something to look at. */
const NOTICEABLE = 0.05

const probability = (p: number): string => {
  const text = formatProbability(p)
  return text.startsWith('<') ? `p ${text}` : `p = ${text}`
}

/** What the data hint at about the scale, as sentences that say what to do; hints, not rules. */
export function agreementHintWords(figures: AgreementFigures): string[] {
  return [normalityWords(figures), slopeWords(figures)].filter((words) => words !== null)
}

function normalityWords({ normality, scale }: AgreementFigures): string | null {
  if (!normality || scale === 'nonparametric' || scale === 'regression') return null
  const what = scale === 'ratio' ? 'logarithms of the ratios' : 'differences'
  const found = `(Shapiro–Wilk W ${formatEstimate(normality.w)}, ${probability(normality.p)})`
  return normality.p < NOTICEABLE
    ? `The ${what} do not look normal ${found}, which the limits rest on: look at the plot, and try ${scale === 'ratio' ? 'percentiles' : 'ratios or percentiles'}.`
    : `The ${what} show no sign of not being normal ${found}.`
}

function slopeWords({ slopeOnMean, scale }: AgreementFigures): string | null {
  if (!slopeOnMean) return null
  const { slope, lower, upper, p } = slopeOnMean
  const bounds = [lower, upper].map((bound) => formatConcentration(bound, 3)).join(' to ')
  const found = `slope of the difference on the mean ${formatConcentration(slope, 3)} (${bounds})`
  if (p === null) return `The differences lie on one line: ${found}.`
  if (p >= NOTICEABLE) return `No sign of a bias that grows with size: ${found}, ${probability(p)}.`
  const next =
    scale === 'difference' || scale === 'nonparametric'
      ? ' Level limits do not describe that: try ratios, or differences that change with size.'
      : ''
  return `A sign of a bias that changes with size: ${found}, ${probability(p)}.${next}`
}
