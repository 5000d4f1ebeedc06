import type { ReportBlock } from '#server/reports/reportDocument.ts'
import type {
  MoreOnArea,
  SubgroupTable,
  SuccessVerdict,
  TroubledResults,
} from '#shared/schemas/accuracyMore.ts'
import type { AccuracyResult } from '#shared/schemas/analysis.ts'
import { SCENARIO_LABELS, SUBGROUPING_LABELS } from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import {
  formatCount,
  formatEstimate,
  formatInterval,
  formatProbability,
} from '#shared/terms/numbers.ts'
import { proportionText, troubledNote } from '#shared/terms/resultText.ts'

/** The parts of an accuracy analysis that were asked for beyond curve, area and table. */
export const accuracyMoreBlocks = ({
  success,
  troubled,
  subgroupTables = [],
  more,
  unit,
}: AccuracyResult): ReportBlock[] => [
  ...(success ? successBlocks(success) : []),
  ...(troubled ? troubledBlocks(troubled, unitLabel(unit)) : []),
  ...subgroupTables.map(subgroupBlock),
  ...(subgroupTables.length > 0
    ? [
        {
          kind: 'paragraph' as const,
          quiet: true,
          text: 'Whether groups differ takes a comparison of their own, not a look at two intervals.',
        },
      ]
    : []),
  ...(more ? moreBlocks(more) : []),
]

/** The interval under its estimate, where columns are narrow. */
const inTwoLines = (text: string): string => text.replace(' (', '\n(')

function successBlocks({ met, parts }: SuccessVerdict): ReportBlock[] {
  return [
    { kind: 'subheading', text: `Success criterion ${met ? 'met' : 'not met'}` },
    ...parts.map(({ sentence }) => ({ kind: 'paragraph' as const, text: sentence })),
  ]
}

function troubledBlocks(troubled: TroubledResults, unit: string): ReportBlock[] {
  const { index, reference } = troubled
  const columns = [
    { label: 'Results in doubt' },
    { label: 'Sensitivity', align: 'right' as const },
    { label: 'Specificity', align: 'right' as const },
  ]
  const rowsOf = (scenarios: TroubledResults['index']['scenarios']) =>
    scenarios.map(({ key, sensitivity, specificity }) => [
      SCENARIO_LABELS[key],
      inTwoLines(proportionText(sensitivity)),
      inTwoLines(proportionText(specificity)),
    ])
  return [
    { kind: 'subheading', text: 'Results in doubt, and results that are not there' },
    { kind: 'paragraph', quiet: true, text: troubledNote(troubled, unit) },
    ...(troubled.zone
      ? [
          {
            kind: 'table' as const,
            caption: 'Indeterminate sensor results',
            columns,
            rows: rowsOf(index.scenarios),
          },
        ]
      : []),
    {
      kind: 'keyValues',
      pairs: [
        { label: 'With a determinate result', value: proportionText(index.determinate) },
        { label: 'With a valid result', value: proportionText(index.valid) },
      ],
    },
    ...(reference.indexPositive + reference.indexNegative > 0
      ? [
          {
            kind: 'table' as const,
            caption: 'Indeterminate reference outcomes',
            columns,
            rows: rowsOf(reference.scenarios),
          },
        ]
      : []),
  ]
}

const subgroupBlock = ({ by, rows }: SubgroupTable): ReportBlock => ({
  kind: 'table',
  caption: `By ${SUBGROUPING_LABELS[by].toLowerCase()}`,
  columns: [
    { label: SUBGROUPING_LABELS[by] },
    { label: 'Present', align: 'right' },
    { label: 'Absent', align: 'right' },
    { label: 'Area', align: 'right' },
    { label: 'Sensitivity', align: 'right' },
    { label: 'Specificity', align: 'right' },
  ],
  rows: rows.map(({ subgroup, present, absent, area, sensitivity, specificity }) => [
    subgroup ?? 'Not recorded',
    formatCount(present),
    formatCount(absent),
    area
      ? `${formatEstimate(area.estimate)}\n(${formatInterval(area.lower, area.upper)})`
      : 'counts only',
    sensitivity ? inTwoLines(proportionText(sensitivity)) : '',
    specificity ? inTwoLines(proportionText(specificity)) : '',
  ]),
})

function moreBlocks({ figures, note }: MoreOnArea): ReportBlock[] {
  return [
    {
      kind: 'table',
      caption: 'More on the area',
      columns: [
        { label: 'Figure' },
        { label: 'Value', align: 'right' },
        { label: 'p', align: 'right' },
        { label: 'Method and source' },
      ],
      rows: figures.map(({ key, label, value, p, method, source }) => [
        label,
        formatEstimate(value, key === 'mannWhitney' ? 1 : 3),
        p === null ? '' : formatProbability(p),
        `${method}\n${source}`,
      ]),
    },
    ...[...figures.map((each) => each.note), note]
      .filter((text) => text !== null)
      .map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
  ]
}
