import { TableChoice, TableSearch } from '../../ui/TableFilters.tsx'
import type { TableParams } from '../../ui/useTableParams.ts'

export type CodeAndSiteFilterProps = {
  params: TableParams
  /** The sites to choose from; of one site there is nothing to choose. */
  sites: readonly { id: string; name: string }[]
}

/** Finds rows by subject code and site, in every list of what subjects have. */
export function CodeAndSiteFilter({ params, sites }: CodeAndSiteFilterProps) {
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
    </>
  )
}
