import type { Measure } from './analysis.ts'
import { unitLabel } from './gases.ts'
import {
  formatConcentration,
  formatCount,
  formatEstimate,
  formatFraction,
  formatInterval,
  NOT_ESTIMABLE,
} from './numbers.ts'

/** How results are written: one wording for the screen and the printed page. */
type MeasureFigures = {
  measure: Measure
  numerator: number | null
  denominator: number | null
  estimate: number | null
  lower: number | null
  upper: number | null
}

const RATIOS: readonly Measure[] = [
  'likelihoodRatioPositive',
  'likelihoodRatioNegative',
  'diagnosticOddsRatio',
]

/** Proportions carry three decimals, ratios two. */
const decimalsOf = (measure: Measure): number => (RATIOS.includes(measure) ? 2 : 3)

/** n/N (blank where it is no proportion), estimate and interval of one measure. */
export function measureTexts(row: MeasureFigures): {
  fraction: string
  estimate: string
  interval: string
} {
  const decimals = decimalsOf(row.measure)
  const { numerator, denominator } = row
  return {
    fraction:
      numerator === null || denominator === null ? '' : formatFraction(numerator, denominator),
    estimate: formatEstimate(row.estimate, decimals),
    interval: intervalText(row, decimals),
  }
}

/** An estimate that stands without an interval says so; why is said beside the table. */
function intervalText({ estimate, lower, upper }: MeasureFigures, decimals: number): string {
  if (estimate === null) return NOT_ESTIMABLE
  return lower === null || upper === null ? 'none' : formatInterval(lower, upper, decimals)
}

/** A number with its unit; alone where it has none. */
export const withUnit = (text: string, unit: string): string => (unit ? `${text} ${unit}` : text)

/** "95 %" from the confidence level 0.95. */
export const levelWords = (confidence: number): string =>
  `${Number((confidence * 100).toFixed(2))} %`

/** "95 % interval" from the confidence level 0.95. */
export const intervalHeading = (confidence: number): string => `${levelWords(confidence)} interval`

/**
 * Bias, limits and their bounds carry the same decimals, so that they can be compared by eye: as many
 * as give the standard deviation of the differences three significant digits.
 */
export function agreementDecimals(sd: number): number {
  if (sd === 0) return 3
  return Math.min(8, Math.max(0, 2 - Math.floor(Math.log10(sd))))
}

/** One line of an agreement with its interval, in the analyte's unit. */
export const lineTexts = (
  line: { estimate: number; lower: number | null; upper: number | null },
  decimals: number,
): { estimate: string; interval: string } => ({
  estimate: formatEstimate(line.estimate, decimals),
  interval: formatInterval(line.lower, line.upper, decimals),
})

type Headline = {
  label: string
  estimate: number
  lower: number | null
  upper: number | null
  unit: string | null
  decimals: number
}

/** "Area 0.731" and "0.630 to 0.833"; without a headline the counts are all there is. */
export function headlineTexts(headline: Headline | null): { figure: string; interval: string } {
  if (!headline) return { figure: 'Counts only', interval: '' }
  const { label, unit, decimals } = headline
  const { estimate, interval } = lineTexts(headline, decimals)
  const measured = withUnit(estimate, unit === null ? '' : unitLabel(unit))
  return { figure: `${label} ${measured}`, interval: headline.lower === null ? '' : interval }
}

type Proportion = {
  numerator: number
  denominator: number
  estimate: number | null
  lower: number | null
  upper: number | null
}

/** "48/90, 0.533 (0.431 to 0.633)". */
export function proportionText({ numerator, denominator, estimate, lower, upper }: Proportion) {
  const fraction = formatFraction(numerator, denominator)
  if (estimate === null) return `${fraction}, ${NOT_ESTIMABLE}`
  return `${fraction}, ${formatEstimate(estimate)} (${formatInterval(lower, upper)})`
}

type Troubled = {
  zone: { lower: number; upper: number } | null
  index: {
    indeterminatePresent: number
    indeterminateAbsent: number
    noValidPresent: number
    noValidAbsent: number
  }
  reference: { indexPositive: number; indexNegative: number }
}

/** How many results are in doubt or missing, and why. */
export function troubledNote({ zone, index, reference }: Troubled, unit: string): string {
  const doubtful = zone
    ? `Sensor results from ${formatConcentration(zone.lower)} to ${withUnit(formatConcentration(zone.upper), unit)} are taken as indeterminate: ${formatCount(index.indeterminatePresent)} with the condition, ${formatCount(index.indeterminateAbsent)} without.`
    : 'No sensor result is taken as indeterminate.'
  return `${doubtful} No valid sensor result: ${formatCount(index.noValidPresent)} with the condition, ${formatCount(index.noValidAbsent)} without; they count neither as positive nor as negative. Reference outcome indeterminate: ${formatCount(reference.indexPositive)} with a positive sensor result, ${formatCount(reference.indexNegative)} with a negative one.`
}

/** How the corrected figures of chosen cut-offs came about. */
export const correctionNote = (of: {
  method: string
  replicates: number
  seed: number
  note: string | null
}): string =>
  of.note ??
  `Corrected for having been chosen on the same data: ${of.method}, ${formatCount(of.replicates)} samples, seed ${of.seed} (Harrell, Lee & Mark 1996, Stat Med 15:361). All of them are exploratory.`
