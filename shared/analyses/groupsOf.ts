import { rollups } from 'd3-array'
import type { DatasetGroups, DatasetRow } from '#shared/schemas/dataset.ts'

/** A covariate with more values than this is a measurement rather than a division. */
const MOST_GROUPS = 12

/** By site, by sex and by each covariate with few values: the groups and how many subjects they hold. */
export function groupsOf(rows: readonly DatasetRow[]): DatasetGroups {
  const subjects = [...new Map(rows.map((row) => [row.subjectId, row])).values()]
  const names = [...new Set(subjects.flatMap((each) => Object.keys(each.covariates)))].sort()
  const divided = (groupOf: (row: DatasetRow) => string | number | null | undefined) =>
    rollups(
      subjects.filter((row) => (groupOf(row) ?? null) !== null),
      (members) => members.length,
      (row) => String(groupOf(row)),
    )
      .map(([group, many]) => ({ group, subjects: many }))
      .sort((one, other) => (one.group < other.group ? -1 : 1))
  return [
    { by: { kind: 'site' as const }, groups: divided((row) => row.site) },
    { by: { kind: 'sex' as const }, groups: divided((row) => row.sex) },
    ...names.map((name) => ({
      by: { kind: 'covariate' as const, name },
      groups: divided((row) => row.covariates[name]),
    })),
  ].filter(({ groups }) => groups.length >= 2 && groups.length <= MOST_GROUPS)
}
