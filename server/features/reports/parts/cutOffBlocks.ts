import type { ReportBlock, ReportTable } from '#server/reports/reportDocument.ts'
import { cutOffLabel } from '#shared/analyses/cutOffLabel.ts'
import type {
  AccuracyAtCutOffResult,
  AccuracyParameters,
  AccuracyResult,
} from '#shared/schemas/analysis.ts'
import {
  ANALYSIS_BADGE_LABELS,
  CUT_OFF_RULE_LABELS,
  type CutOffRule,
  measureLabel,
} from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration, formatCount, formatEstimate } from '#shared/terms/numbers.ts'
import { POSITIVE_RULES } from '#shared/terms/protocol.ts'
import { intervalHeading, measureTexts, withUnit } from '#shared/terms/resultText.ts'

/** The protocol's cut-off and those that rules choose from the data, each with its standing. */
export function cutOffTable(result: AccuracyResult, unit: string): ReportTable {
  const { plannedCutOff, rules } = result
  const planned =
    plannedCutOff === null
      ? []
      : [
          [
            ANALYSIS_BADGE_LABELS.planned,
            'by the protocol',
            withUnit(formatConcentration(plannedCutOff), unit),
            ...plannedAccuracy(result),
          ],
        ]
  return {
    kind: 'table',
    caption: 'Cut-offs',
    columns: [
      { label: 'Standing' },
      { label: 'Chosen' },
      { label: 'Cut-off', align: 'right' },
      { label: 'Sensitivity', align: 'right' },
      { label: 'Specificity', align: 'right' },
    ],
    rows: [
      ...planned,
      ...rules.map(({ rule, cutOffs: [preferred] }) => [
        ANALYSIS_BADGE_LABELS.exploratory,
        `from these data: ${CUT_OFF_RULE_LABELS[rule]}`,
        preferred?.threshold == null
          ? 'nobody positive'
          : withUnit(formatConcentration(preferred.threshold), unit),
        ...chosenTexts(result, rule, preferred),
      ]),
    ],
  }
}

/** As on these data and, under it, as to be expected elsewhere. */
function chosenTexts(
  { corrections }: AccuracyResult,
  rule: CutOffRule,
  here: { sensitivity: number; specificity: number } | undefined,
): [string, string] {
  const found = corrections?.rules.find((each) => each.rule === rule)
  const text = (name: 'sensitivity' | 'specificity') => {
    const corrected = found ? `corrected ${formatEstimate(found.corrected[name])}` : 'not corrected'
    return `${formatEstimate((found?.apparent ?? here)?.[name])}\n${corrected}`
  }
  return [text('sensitivity'), text('specificity')]
}

/** Sensitivity and specificity at the planned cut-off, where the analysis was run at it. */
function plannedAccuracy({ plannedCutOff, atCutOff }: AccuracyResult): [string, string] {
  const measures = atCutOff?.cutOff === plannedCutOff ? atCutOff?.measures : undefined
  const text = (name: 'sensitivity' | 'specificity') => {
    const found = measures?.find(({ measure }) => measure === name)
    return found ? measureTexts(found).estimate : 'not run'
  }
  return [text('sensitivity'), text('specificity')]
}

/** Two-by-two table and measures at one cut-off. */
export function cutOffBlocks(
  at: AccuracyAtCutOffResult,
  result: AccuracyResult,
  { confidence, direction, prevalence }: AccuracyParameters,
): ReportBlock[] {
  const unit = unitLabel(result.unit)
  const isPlanned = at.cutOff === result.plannedCutOff
  return [
    {
      kind: 'subheading',
      text: `At ${withUnit(formatConcentration(at.cutOff), unit)} (${cutOffLabel(at.cutOff, result.plannedCutOff, result.rules)})`,
    },
    {
      kind: 'paragraph',
      quiet: true,
      text: `${POSITIVE_RULES[direction]} ${withUnit(formatConcentration(at.cutOff), unit)}.${isPlanned ? '' : ' It is not the planned cut-off, so what it shows is exploratory.'}`,
    },
    twoByTwoTable(at.table),
    measuresTable(at, confidence, prevalence),
    ...[at.observedPredictiveValuesHidden, at.caveat, ...notesOf(at)]
      .filter((text) => text !== null)
      .map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
  ]
}

function twoByTwoTable(table: AccuracyAtCutOffResult['table']): ReportTable {
  return {
    kind: 'table',
    columns: [
      { label: 'Sensor' },
      { label: 'Present', align: 'right' },
      { label: 'Absent', align: 'right' },
    ],
    rows: [
      ['Positive', formatCount(table.truePositives), formatCount(table.falsePositives)],
      ['Negative', formatCount(table.falseNegatives), formatCount(table.trueNegatives)],
    ],
  }
}

function measuresTable(
  { measures }: AccuracyAtCutOffResult,
  confidence: number,
  prevalence: number | null,
): ReportTable {
  return {
    kind: 'table',
    columns: [
      { label: 'Measure' },
      { label: 'n/N', align: 'right' },
      { label: 'Estimate', align: 'right' },
      { label: intervalHeading(confidence), align: 'right' },
      { label: 'Method' },
    ],
    rows: measures.map((row) => {
      const { fraction, estimate, interval } = measureTexts(row)
      return [measureLabel(row.measure, prevalence), fraction, estimate, interval, row.method]
    }),
  }
}

/** Why a measure stands without a value or an interval; the same reason once. */
const notesOf = ({ measures }: AccuracyAtCutOffResult): string[] => [
  ...new Set(measures.flatMap(({ note }) => (note === null ? [] : [note]))),
]
