import type { AgreementFigures } from '#shared/schemas/agreement.ts'
import {
  type AgreementScale,
  DIFFERENCE_LABELS,
  MIDDLE_LINE_LABELS,
  type TrueValue,
} from '#shared/terms/agreementTerms.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration, formatCount, formatEstimate } from '#shared/terms/numbers.ts'
import {
  agreementDecimals,
  intervalHeading,
  lineTexts,
  withUnit,
} from '#shared/terms/resultText.ts'
import type { ResultTable } from './ResultTable.ts'

/** Unit of the lines as a person reads it, from that of the analyte. */
export const lineUnit = ({ differenceUnit }: AgreementFigures, unit: string): string =>
  differenceUnit === null ? unit : unitLabel(differenceUnit)

const SD_LABELS: Record<AgreementScale, string> = {
  difference: 'SD of the differences',
  ratio: 'SD of the logarithms of ratios',
  percent: 'SD of the percent differences',
  regression: 'SD about the line',
  nonparametric: 'SD of the differences',
}

/** Bias and limits with their intervals; where they slope, at three sizes. */
export function limitsTable(
  figures: AgreementFigures,
  unit: string,
  confidence: number,
): ResultTable {
  const { scale, sd, limitsMethod, biasMethod } = figures
  const decimals = agreementDecimals(sd)
  const shownIn = lineUnit(figures, unit)
  const row = (name: string, line: AgreementFigures['bias']) => {
    const { estimate, interval } = lineTexts(line, decimals)
    return [name, estimate, interval]
  }
  const levels =
    figures.alongMean.length > 0
      ? figures.alongMean.flatMap(({ mean, bias, lowerLimit, upperLimit }) => {
          const at = `at a mean of ${withUnit(formatConcentration(mean), unit)}`
          return [
            row(`Upper limit ${at}`, upperLimit),
            row(`Bias ${at}`, bias),
            row(`Lower limit ${at}`, lowerLimit),
          ]
        })
      : [
          row('Upper limit', figures.upperLimit),
          row(MIDDLE_LINE_LABELS[scale], figures.bias),
          row('Lower limit', figures.lowerLimit),
        ]
  return {
    caption: 'Bias and limits of agreement',
    columns: [
      { header: `${DIFFERENCE_LABELS[scale]}${shownIn ? ` (${shownIn})` : ''}` },
      { header: 'Estimate', numeric: true },
      { header: intervalHeading(confidence), numeric: true },
    ],
    rows: [...levels, [SD_LABELS[scale], formatEstimate(sd, decimals), '']],
    notes: [
      `95 % of ${scale === 'ratio' ? 'ratios' : 'differences'} are expected between the limits. Intervals: ${
        limitsMethod === biasMethod
          ? limitsMethod
          : `${limitsMethod} for the limits; ${biasMethod} for the middle line`
      }.`,
    ],
  }
}

const REPLICATES: Record<TrueValue, string> = {
  varying: 'true value taken to change from session to session',
  constant: 'true value taken to stay the same',
}

/** How the spread of single sessions comes about, where subjects have several; else null. */
export function replicatesWords(figures: AgreementFigures, unit: string): string | null {
  const { replicates, scale, sd } = figures
  if (!replicates) return null
  const decimals = agreementDecimals(sd)
  const shownIn = scale === 'ratio' ? 'on the scale of logarithms' : unit
  const said = (value: number | null) =>
    value === null ? 'not known' : withUnit(formatEstimate(value, decimals), shownIn)
  const { trueValue, subjects, pairs } = replicates
  const within =
    trueValue === 'varying'
      ? `SD of the differences within subjects ${said(replicates.withinDifferences)}`
      : `SD within subjects ${said(replicates.withinSensor)} by the sensor and ${said(replicates.withinReference)} by the reference`
  return `${formatCount(pairs)} pairs of ${formatCount(subjects)} subjects, ${REPLICATES[trueValue]}: ${within}.`
}
