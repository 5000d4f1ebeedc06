import type { SubgroupTable } from '#shared/schemas/accuracyMore.ts'
import { subgroupAccuracy } from '#shared/statistics/cutOffs/subgroupAccuracy.ts'
import type { Subgrouping } from '#shared/terms/analysis.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import { LEAST_PER_CLASS } from './leastPerClass.ts'
import { proportionOf } from './proportionOf.ts'
import type { SubjectValues } from './subjectValues.ts'

type At = { cutOff: number | null; direction: Direction; confidence: number }

/** Stands behind every name, so that those without one come last. */
const NOT_RECORDED = '\uffff'

/**
 * Area and accuracy at the cut-off in each group of subjects; counts alone where a class has fewer than
 * ten.
 * @param subjects each with one value of the analyte or null
 */
export function subgroupTablesOf(
  subjects: readonly SubjectValues[],
  groupings: readonly Subgrouping[],
  { cutOff, direction, confidence: level }: At,
): SubgroupTable[] {
  const counted = subjects.filter(
    ({ outcome, values }) => values[0] !== null && (outcome === 'present' || outcome === 'absent'),
  )
  if (counted.length === 0) return []
  return groupings.map((by) => {
    const values = counted.map(({ subject, outcome, values: [value] }) => ({
      value: value!,
      present: outcome === 'present',
      subgroup: subject[by] ?? NOT_RECORDED,
    }))
    const at = { direction, cutOff: cutOff ?? 0, leastPerClass: LEAST_PER_CLASS }
    const rows = subgroupAccuracy(values, at, { level })
    return { by, rows: rows.map((row) => rowOf(row, cutOff !== null)) }
  })
}

type Found = ReturnType<typeof subgroupAccuracy>[number]

function rowOf({ subgroup, nPresent, nAbsent, area, atCutOff }: Found, hasCutOff: boolean) {
  return {
    subgroup: subgroup === NOT_RECORDED ? null : subgroup,
    present: nPresent,
    absent: nAbsent,
    area: area && {
      estimate: area.area,
      lower: area.shown.lower,
      upper: area.shown.upper,
      method: area.shown.method,
      standardError: area.standardError,
      note: area.notEstimable?.sentence ?? null,
    },
    sensitivity: area && hasCutOff ? proportionOf(atCutOff.sensitivity) : null,
    specificity: area && hasCutOff ? proportionOf(atCutOff.specificity) : null,
  }
}
