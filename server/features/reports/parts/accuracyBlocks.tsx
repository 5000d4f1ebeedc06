import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { accuracyValues } from '#shared/analyses/accuracyValues.ts'
import { curvePoints } from '#shared/analyses/curvePoints.ts'
import { cutOffLabel } from '#shared/analyses/cutOffLabel.ts'
import { OutcomeStrip } from '#shared/figures/OutcomeStrip.tsx'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import type { RocCutOff } from '#shared/figures/rocCurveTypes.ts'
import type { AccuracyParameters, AccuracyResult } from '#shared/schemas/analysis.ts'
import { NOT_CORRECTED } from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import {
  formatConcentration,
  formatCount,
  formatEstimate,
  formatInterval,
} from '#shared/terms/numbers.ts'
import { POSITIVE_RULES } from '#shared/terms/protocol.ts'
import { correctionNote, intervalHeading, withUnit } from '#shared/terms/resultText.ts'
import type { ReportSource, StoredAnalysis } from '../reportSource.ts'
import { accuracyMoreBlocks } from './accuracyMoreBlocks.ts'
import { cutOffBlocks, cutOffTable } from './cutOffBlocks.ts'

/** Area, curve, values by outcome, and what the cut-off tells. */
export function accuracyBlocks(
  source: ReportSource,
  { number, parameters }: StoredAnalysis,
  result: AccuracyResult,
): ReportBlock[] {
  if (parameters.kind !== 'accuracy') throw new Error('The parameters are of another kind.')
  const unit = unitLabel(result.unit)
  const id = `analysis-${number}`
  return [
    ...areaBlocks(result, parameters),
    {
      kind: 'figure',
      share: 0.62,
      caption: `Sensitivity against 1 − specificity for ${result.analyteName}. ${POSITIVE_RULES[parameters.direction]} the cut-off.`,
      figure: (
        <RocCurve
          id={`${id}-roc`}
          curves={[
            {
              label: result.analyteName,
              unit,
              points: curvePoints(result.curve),
              ...(result.area ? { area: result.area } : {}),
            },
          ]}
          {...(result.atCutOff ? { cutOff: markOf(result, unit) } : {})}
        />
      ),
    },
    stripBlock(source, parameters, result, `${id}-strip`),
    cutOffTable(result, unit),
    ...(result.rules.length > 0 ? [correctionBlock(result)] : []),
    ...(result.atCutOff ? cutOffBlocks(result.atCutOff, result, parameters) : []),
    ...accuracyMoreBlocks(result),
  ]
}

const correctionBlock = ({ corrections }: AccuracyResult): ReportBlock => ({
  kind: 'paragraph',
  quiet: true,
  text: corrections ? correctionNote(corrections) : NOT_CORRECTED,
})

function areaBlocks(
  { area, areaWithheld }: AccuracyResult,
  { confidence }: AccuracyParameters,
): ReportBlock[] {
  if (!area) return [{ kind: 'paragraph', text: areaWithheld ?? 'No area is given.' }]
  const blocks: ReportBlock[] = [
    {
      kind: 'subheading',
      text: `Area under the curve ${formatEstimate(area.estimate)} (${formatInterval(area.lower, area.upper)})`,
    },
    {
      kind: 'paragraph',
      quiet: true,
      text: `${intervalHeading(confidence)}, ${area.method}.`,
    },
  ]
  if (area.note) blocks.push({ kind: 'paragraph', quiet: true, text: area.note })
  return blocks
}

function markOf(result: AccuracyResult, unit: string): RocCutOff {
  const { cutOff, table } = result.atCutOff!
  return {
    value: cutOff,
    unit,
    label: cutOffLabel(cutOff, result.plannedCutOff, result.rules),
    sensitivity: table.truePositives / (table.truePositives + table.falseNegatives),
    falsePositiveFraction: table.falsePositives / (table.falsePositives + table.trueNegatives),
  }
}

function stripBlock(
  { rows }: ReportSource,
  { analyteKey, sessionRule }: AccuracyParameters,
  result: AccuracyResult,
  id: string,
): ReportBlock {
  const { present, absent } = accuracyValues(rows, analyteKey, sessionRule)
  const unit = unitLabel(result.unit)
  const mark = result.atCutOff && {
    value: result.atCutOff.cutOff,
    label: cutOffLabel(result.atCutOff.cutOff, result.plannedCutOff, result.rules),
  }
  const line = mark
    ? ` The dashed line: ${withUnit(formatConcentration(mark.value), unit)}, ${mark.label}.`
    : ''
  return {
    kind: 'figure',
    caption: `Values of ${result.analyteName} by reference outcome: ${formatCount(present.length)} present (filled discs), ${formatCount(absent.length)} absent (open diamonds).${line}`,
    figure: (
      <OutcomeStrip
        id={id}
        width={680}
        label={result.analyteName}
        unit={unit}
        present={present}
        absent={absent}
        {...(mark ? { cutOff: mark } : {})}
      />
    ),
  }
}
