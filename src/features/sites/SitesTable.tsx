import { useMemo } from 'react'
import type { Site } from '#shared/schemas/site.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { DataTable } from '../../ui/DataTable.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { LinkButton } from '../../ui/LinkButton.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

type SitesTableProps = {
  sites: readonly Site[] | undefined
  status: { isPending: boolean; isFetching: boolean; error: Error | null; refetch: () => unknown }
  /** Without it sites are only read. */
  onCorrect?: (site: Site) => void
}

/** The sites with their prefixes and how many subjects each has. */
export function SitesTable({ sites, status, onCorrect }: SitesTableProps) {
  const columns = useMemo(() => columnsFor(onCorrect), [onCorrect])
  return (
    <DataTable
      caption="Sites"
      hideCaption
      columns={columns}
      rows={sites}
      rowId={(site) => site.id}
      status={status}
      empty={<EmptyPlace title="No site yet" />}
    />
  )
}

function columnsFor(onCorrect: ((site: Site) => void) | undefined): TableColumn<Site>[] {
  return [
    { id: 'name', header: 'Site', value: (site) => site.name },
    { id: 'prefix', header: 'Prefix', value: (site) => site.prefix, mono: true },
    {
      id: 'subjects',
      header: 'Subjects',
      value: (site) => site.subjectCount,
      cell: (site) => formatCount(site.subjectCount),
      numeric: true,
    },
    {
      id: 'planned',
      header: 'Planned',
      value: (site) => site.plannedSubjects,
      cell: (site) => (site.plannedSubjects === null ? '–' : formatCount(site.plannedSubjects)),
      numeric: true,
    },
    ...(onCorrect
      ? [
          {
            id: 'correct',
            header: 'Correct',
            hideHeader: true,
            value: () => null,
            cell: (site: Site) => (
              <LinkButton onClick={() => onCorrect(site)}>
                Correct<span className="sr-only"> {site.name}</span>
              </LinkButton>
            ),
          },
        ]
      : []),
  ]
}
