import { SEX_LABELS, SEXES } from '#shared/terms/subject.ts'
import { TableChoice, TableSearch, TableToggle } from '../../ui/TableFilters.tsx'
import type { TableParams } from '../../ui/useTableParams.ts'

export const SUBJECT_FILTERS = ['code', 'siteId', 'sex', 'needs'] as const

type SubjectFiltersProps = {
  params: TableParams
  /** The sites to choose from; of one site there is nothing to choose. */
  sites: readonly { id: string; name: string }[]
}

export function SubjectFilters({ params, sites }: SubjectFiltersProps) {
  return (
    <>
      <TableSearch params={params} name="code" label="Subject code" />
      {sites.length > 1 && (
        <TableChoice
          params={params}
          name="siteId"
          label="Site"
          options={sites.map(({ id, name }) => ({ value: id, label: name }))}
        />
      )}
      <TableChoice
        params={params}
        name="sex"
        label="Sex"
        options={SEXES.map((value) => ({ value, label: SEX_LABELS[value] }))}
      />
      <TableToggle params={params} name="needs" value="session" label="Needs a session" />
      <TableToggle params={params} name="needs" value="outcome" label="Needs an outcome" />
    </>
  )
}
