import type { DifferencePlotProps } from '#shared/figures/DifferencePlot.tsx'
import type { AgreementLine } from '#shared/figures/differencePlotTypes.ts'
import type { AgreementFigures, AgreementLineFigures } from '#shared/schemas/agreement.ts'
import { DIFFERENCE_LABELS, MIDDLE_LINE_LABELS } from '#shared/terms/agreementTerms.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import type { AgreementPairs } from './agreementPairs.ts'
import { heightAt } from './outsideLimits.ts'
import { plottedDifference } from './plottedDifference.ts'

/** What the plot of differences draws of stored figures, on the screen and in print alike. */
export function differencePlotOf(
  pairs: Pick<AgreementPairs, 'sensor' | 'reference' | 'subjects'>,
  figures: AgreementFigures,
  unit: string,
): Omit<DifferencePlotProps, 'id' | 'width' | 'theme'> {
  const { scale, centre, acceptance, differenceUnit } = figures
  return {
    pairs: pairs.sensor.map((sensor, at) => {
      const reference = pairs.reference[at]!
      return {
        mean: (sensor + reference) / 2,
        difference: plottedDifference(scale, sensor, reference),
        subject: pairs.subjects[at]!,
      }
    }),
    bias: drawn(figures.bias, centre),
    lowerLimit: drawn(figures.lowerLimit, centre),
    upperLimit: drawn(figures.upperLimit, centre),
    unit,
    differenceLabel: DIFFERENCE_LABELS[scale],
    lineNames: {
      upper: 'Upper limit',
      middle: scale === 'regression' ? 'Bias' : MIDDLE_LINE_LABELS[scale],
      lower: 'Lower limit',
    },
    noDifference: scale === 'ratio' ? 1 : 0,
    ...(differenceUnit === null ? {} : { differenceUnit: unitLabel(differenceUnit) }),
    ...(acceptance ? { acceptance } : {}),
  }
}

function drawn(line: AgreementLineFigures, centre: number | null): AgreementLine {
  const { estimate, lower, upper, slope } = line
  if (centre !== null) return { intercept: heightAt(line, centre, 0), slope }
  return {
    intercept: estimate,
    ...(lower === null || upper === null ? {} : { interval: { lower, upper } }),
  }
}
