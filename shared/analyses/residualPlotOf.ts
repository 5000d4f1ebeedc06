import type { DifferencePlotProps } from '#shared/figures/DifferencePlot.tsx'
import { zFor } from '#shared/statistics/distributions/zFor.ts'
import type { AgreementPairs } from './agreementPairs.ts'
import type { ScatterFit } from './scatterFitOf.ts'

/**
 * Residuals of the sensor about a fitted line, against the reference; the outer lines hold 95 % of
 * normal residuals, z·√(Σ r²/(n − 2)).
 */
export function residualPlotOf(
  { sensor, reference, subjects }: Pick<AgreementPairs, 'sensor' | 'reference' | 'subjects'>,
  { label, intercept, slope }: ScatterFit,
  unit: string,
): Omit<DifferencePlotProps, 'id' | 'width' | 'theme'> {
  const pairs = sensor.map((value, at) => ({
    mean: reference[at]!,
    difference: value - intercept - slope * reference[at]!,
    subject: subjects[at]!,
  }))
  const squares = pairs.reduce((sum, { difference }) => sum + difference ** 2, 0)
  const half = zFor(0.95) * Math.sqrt(squares / (pairs.length - 2))
  return {
    title: `Residuals of the ${label} line`,
    pairs,
    unit,
    bias: { intercept: 0 },
    lowerLimit: { intercept: -half },
    upperLimit: { intercept: half },
    lineNames: { upper: 'Upper 95 %', middle: 'Fitted line', lower: 'Lower 95 %' },
    meanLabel: 'Reference',
    differenceLabel: `Sensor − ${label} line`,
  }
}
