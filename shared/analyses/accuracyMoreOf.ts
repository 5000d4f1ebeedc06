import type { AccuracyMore } from '#shared/schemas/accuracyMore.ts'
import type {
  AccuracyAtCutOffResult,
  AccuracyOverall,
  AccuracyParameters,
} from '#shared/schemas/analysis.ts'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import type { AccuracyValues } from './accuracyValues.ts'
import { cutOffCorrectionsOf } from './cutOffCorrectionsOf.ts'
import { moreOnAreaOf } from './moreOnAreaOf.ts'
import { subgroupTablesOf } from './subgroupTablesOf.ts'
import { subjectValues } from './subjectValues.ts'
import { successVerdictOf } from './successVerdictOf.ts'
import { troubledResultsOf } from './troubledResultsOf.ts'

type Found = {
  rows: readonly DatasetRow[]
  values: AccuracyValues
  overall: AccuracyOverall
  atCutOff: AccuracyAtCutOffResult | null
}

/** The parts of an accuracy analysis that were asked for beyond curve, area and table. */
export function accuracyMoreOf(
  { rows, values, overall, atCutOff }: Found,
  parameters: AccuracyParameters,
  onProgress?: (share: number) => void,
): AccuracyMore {
  const { analyteKey, direction, sessionRule, cutOff } = parameters
  const { resampling, partialArea, troubledResults, subgroups, floors } = parameters
  const subjects = () => subjectValues(rows, [analyteKey], sessionRule)
  const { area } = overall
  const more: AccuracyMore = {}
  if (resampling) more.corrections = cutOffCorrectionsOf(values, direction, resampling, onProgress)
  if (partialArea && area)
    more.more = moreOnAreaOf(values, rocCurve({ ...values, direction }), area, partialArea)
  if (troubledResults && cutOff !== null)
    more.troubled = troubledResultsOf(subjects(), { ...parameters, ...troubledResults, cutOff })
  if (subgroups.length > 0)
    more.subgroupTables = subgroupTablesOf(subjects(), subgroups, parameters)
  if (floors) more.success = successVerdictOf(floors, area, atCutOff)
  return more
}
