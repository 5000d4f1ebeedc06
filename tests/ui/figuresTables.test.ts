import { expect, test } from 'vitest'
import { differencePairsTable, differencePlotTable } from '#shared/figures/differencePlotTable.ts'
import { columnHeading, type FigureTable, formatCell } from '#shared/figures/figureTable.ts'
import { outcomeStripTable } from '#shared/figures/outcomeStripTable.ts'
import { rocCurveTable } from '#shared/figures/rocCurveTable.ts'
import { scatterIdentityTable } from '#shared/figures/scatterIdentityTable.ts'

/** A table as its reader sees it. */
function read(table: FigureTable): string[][] {
  return [
    table.columns.map(columnHeading),
    ...table.rows.map((row) => table.columns.map((column) => formatCell(column, row[column.key]!))),
  ]
}

const points = [
  { falsePositiveFraction: 0, sensitivity: 0, threshold: null },
  { falsePositiveFraction: 0.25, sensitivity: 0.75, threshold: 1180 },
  { falsePositiveFraction: 1, sensitivity: 1, threshold: 62.5 },
]

test('the table of a ROC curve holds every point with its threshold', () => {
  expect(read(rocCurveTable({ curves: [{ label: 'Ammonia', unit: 'ppb', points }] }))).toEqual([
    ['Threshold (ppb)', 'Sensitivity', 'Specificity', '1 − specificity'],
    ['beyond every value', '0.000', '1.000', '0.000'],
    ['1,180', '0.750', '0.750', '0.250'],
    ['62.5', '1.000', '0.000', '1.000'],
  ])
})

test('biomarkers in different units keep their own unit in the table', () => {
  const table = rocCurveTable({
    curves: [
      { label: 'Ammonia', unit: 'ppb', points },
      { label: 'Acetone', unit: 'ppm', points },
    ],
  })
  const [heading, , second] = read(table)
  expect(heading).toContain('Unit')
  expect(heading).toContain('Threshold')
  expect(second).toEqual(['Ammonia', '1,180', 'ppb', '0.750', '0.750', '0.250'])
})

test('the table of the strip counts the positives that the cut-off gives, both ways', () => {
  const strip = { label: 'Ammonia', unit: 'ppb', present: [10, 20, 30, 40, 50], absent: [5, 20] }
  const higher = outcomeStripTable({ ...strip, cutOff: { value: 20, direction: 'higher' } })
  const lower = outcomeStripTable({ ...strip, cutOff: { value: 20, direction: 'lower' } })
  // Quartiles by hand: ranks 2 and 4 of five values.
  expect(read(higher)[1]).toEqual(['Present', '5', '10', '20', '30', '40', '50', '4'])
  expect(higher.rows.map(({ positive }) => positive)).toEqual([4, 1])
  expect(lower.rows.map(({ positive }) => positive)).toEqual([2, 2])
})

test('an outcome that nobody has is said as that', () => {
  const table = outcomeStripTable({ label: 'Ammonia', unit: 'ppb', present: [], absent: [1] })
  expect(read(table)[1]).toEqual(['Present', '0', ...Array(5).fill('not estimable')])
})

const agreement = {
  unit: 'ppb',
  pairs: [{ mean: 100, difference: -4, subject: 'N04-7316-W' }],
  bias: { intercept: -4, interval: { lower: -9, upper: 1 } },
  lowerLimit: { intercept: -30 },
  upperLimit: { intercept: 22 },
  acceptance: { lower: -50, upper: 50 },
}

test('the table of a difference plot names bias, limits and what was agreed beforehand', () => {
  expect(read(differencePlotTable(agreement))).toEqual([
    ['Line', 'Estimate (ppb)', '95 % interval from (ppb)', '95 % interval to (ppb)'],
    ['Upper limit', '22', 'not given', 'not given'],
    ['Bias', '−4', '−9', '1'],
    ['Lower limit', '−30', 'not given', 'not given'],
    ['Acceptable up to', '50', 'set beforehand', 'set beforehand'],
    ['Acceptable down to', '−50', 'set beforehand', 'set beforehand'],
  ])
})

test('pairs are listed with their subject where it is known', () => {
  expect(read(differencePairsTable({ ...agreement, differenceUnit: '%' }))).toEqual([
    ['Subject', 'Mean (ppb)', 'Difference (%)'],
    ['N04-7316-W', '100', '−4'],
  ])
  expect(
    read(scatterIdentityTable({ unit: 'ppb', pairs: [{ reference: 1180, sensor: 1204.5 }] })),
  ).toEqual([
    ['Reference (ppb)', 'Sensor (ppb)'],
    ['1,180', '1,205'],
  ])
})
