import type { FigureTable } from './figureTable.ts'
import type { RocCurveSeries } from './rocCurveTypes.ts'

/**
 * Every point of every curve, in full precision. A threshold of null lies beyond the last observed
 * value, where nobody is positive.
 */
export function rocCurveTable({ curves }: { curves: readonly RocCurveSeries[] }): FigureTable {
  const units = new Set(curves.map(({ unit }) => unit))
  const one = units.size === 1
  return {
    caption: 'Sensitivity and specificity at every threshold',
    columns: [
      ...(curves.length > 1
        ? [{ key: 'biomarker', label: 'Biomarker', format: 'text' as const }]
        : []),
      {
        key: 'threshold',
        label: 'Threshold',
        format: 'concentration',
        ...(one ? { unit: curves[0]!.unit } : {}),
      },
      ...(one ? [] : [{ key: 'unit', label: 'Unit', format: 'text' as const }]),
      { key: 'sensitivity', label: 'Sensitivity', format: 'proportion' },
      { key: 'specificity', label: 'Specificity', format: 'proportion' },
      { key: 'falsePositiveFraction', label: '1 − specificity', format: 'proportion' },
    ],
    rows: curves.flatMap(({ label, unit, points }) =>
      points.map((point) => ({
        biomarker: label,
        threshold: finiteOrWords(point.threshold),
        unit,
        sensitivity: point.sensitivity,
        specificity: 1 - point.falsePositiveFraction,
        falsePositiveFraction: point.falsePositiveFraction,
      })),
    ),
  }
}

function finiteOrWords(threshold: number | null): number | string {
  return threshold !== null && Number.isFinite(threshold) ? threshold : 'beyond every value'
}
