import { SEX_LABELS, SEXES } from '#shared/terms/subject.ts'
import { TableChoice, TableToggle } from '../../ui/TableFilters.tsx'
import { CodeAndSiteFilter, type CodeAndSiteFilterProps } from './CodeAndSiteFilter.tsx'

export const SUBJECT_FILTERS = ['code', 'siteId', 'sex', 'needs'] as const

export function SubjectFilters({ params, sites }: CodeAndSiteFilterProps) {
  return (
    <>
      <CodeAndSiteFilter params={params} sites={sites} />
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
