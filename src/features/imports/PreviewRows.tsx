import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { DataImport, ImportMapping } from '#shared/schemas/import.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Site } from '#shared/schemas/site.ts'
import { ROW_FATE_LABELS, ROW_FATES, type RowFate } from '#shared/terms/importState.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { DataTable } from '../../ui/DataTable.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { Segments } from '../../ui/Segments.tsx'
import { type TableParams, useTableParams } from '../../ui/useTableParams.ts'
import { entryColumns } from './entryColumns.tsx'
import { importRowsQuery } from './imports.api.ts'
import { problemColumns, problemLines } from './problemColumns.tsx'

type PreviewRowsProps = {
  studyId: string
  of: DataImport & { mapping: ImportMapping }
  analytes: readonly Analyte[]
  sites: readonly Site[]
  /** Lines that are to stay out, as text; null where nothing can be chosen. */
  leftOut: { lines: ReadonlySet<string>; onChange: (lines: ReadonlySet<string>) => void } | null
}

/** The rows by fate, a page at a time. */
export function PreviewRows(props: PreviewRowsProps) {
  const { of } = props
  const table = useTableParams({ filters: ['fate'] })
  const fate = ROW_FATES.find((each) => each === table.filters.fate) ?? firstFate(of)
  return (
    <div>
      <div className="mb-3">
        <Segments
          label="Rows"
          hideLabel
          options={ROW_FATES.map((value) => ({
            value,
            label: `${ROW_FATE_LABELS[value]} ${formatCount(of.counts?.[value] ?? 0)}`,
          }))}
          value={fate}
          onChange={(value) => table.setFilter('fate', value)}
        />
      </div>
      {fate === 'refused' ? (
        <Problems {...props} table={table} />
      ) : (
        <Entries key={fate} {...props} fate={fate} table={table} />
      )}
    </div>
  )
}

/** What a person wants to see first: rows to enter, or else why there are none. */
const firstFate = ({ counts }: DataImport): RowFate =>
  (['new', 'refused', 'same'] as const).find((fate) => counts && counts[fate] > 0) ?? 'new'

/** The fate is shown by the segments above: to the table itself nothing is narrowed. */
const asWhole = (table: TableParams): TableParams => ({ ...table, filters: {} })

/** Few enough that the button below stays in reach. */
const ROWS_A_PAGE = '20'

type PageProps = PreviewRowsProps & { table: TableParams }

function useRows({ studyId, of, table }: PageProps, fate: RowFate) {
  return useQuery(
    importRowsQuery(studyId, of.id, of.version, { ...table.request, fate, limit: ROWS_A_PAGE }),
  )
}

function Entries(props: PageProps & { fate: RowFate }) {
  const { of, analytes, sites, leftOut, fate, table } = props
  const rows = useRows(props, fate)
  const columns = useMemo(
    () => entryColumns({ mapping: of.mapping, analytes, sites }),
    [of.mapping, analytes, sites],
  )
  const choosing = fate === 'new' && of.counts?.new ? leftOut : null
  return (
    <>
      {choosing && (
        <p className="mb-2 text-sm text-ink-2">
          As they will be entered. Tick the rows that are to stay out.
        </p>
      )}
      <DataTable
        caption={fate === 'new' ? 'Rows to enter' : 'Rows that are here already'}
        hideCaption
        columns={columns}
        rows={rows.data?.items}
        rowId={(row) => String(row.line)}
        params={asWhole(table)}
        order="server"
        page={rows.data}
        status={rows}
        selection={
          choosing
            ? {
                selected: choosing.lines,
                onChange: choosing.onChange,
                nameOf: (row) => `line ${row.line}, to leave it out`,
              }
            : undefined
        }
        empty={
          fate === 'new' ? (
            <EmptyPlace title="No row can be entered">
              Either everything is here already, or every row is refused.
            </EmptyPlace>
          ) : (
            <EmptyPlace title="No row is here already" />
          )
        }
      />
    </>
  )
}

function Problems(props: PageProps) {
  const rows = useRows(props, 'refused')
  const items = rows.data?.items
  const lines = useMemo(() => items && problemLines(items), [items])
  return (
    <DataTable
      caption="Refused rows"
      hideCaption
      columns={problemColumns}
      rows={lines}
      rowId={(row) => row.id}
      params={asWhole(props.table)}
      order="server"
      page={rows.data && { next: rows.data.next }}
      status={rows}
      empty={<EmptyPlace title="No row is refused" />}
    />
  )
}
