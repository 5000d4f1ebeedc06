import type { ImportMapping, Meaning } from '#shared/schemas/import.ts'

export type HeadingOf = (as: Meaning, analyteKey?: string) => string

/** The heading of the column with a meaning. */
export function headings(mapping: ImportMapping): HeadingOf {
  return (as, analyteKey) =>
    mapping.columns.find(
      ({ meaning }) =>
        meaning.as === as &&
        (analyteKey === undefined ||
          ('analyteKey' in meaning && meaning.analyteKey === analyteKey) ||
          ('key' in meaning && meaning.key === analyteKey)),
    )?.name ?? ''
}
