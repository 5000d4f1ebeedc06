import { Link } from 'react-router-dom'
import type { ImportSummary } from '#shared/schemas/import.ts'
import { IMPORT_STATE_LABELS, type ImportState } from '#shared/terms/importState.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { formatBytes } from '../../ui/formatBytes.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { Tag, type TagTone } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

const TONES: Partial<Record<ImportState, TagTone>> = {
  entered: 'good',
  uploaded: 'warn',
  previewed: 'warn',
  failed: 'stop',
}

/** @param mayOpen whether the reader may look into a file */
export const importColumns = (mayOpen: boolean): TableColumn<ImportSummary>[] => [
  {
    id: 'number',
    header: 'Import',
    value: (row) => row.number,
    cell: (row) =>
      mayOpen ? (
        <Link to={row.id} className="link font-semibold">
          {row.number}
        </Link>
      ) : (
        row.number
      ),
    sortable: true,
  },
  {
    id: 'state',
    header: 'State',
    value: (row) => row.state,
    cell: (row) => <Tag tone={TONES[row.state]}>{IMPORT_STATE_LABELS[row.state]}</Tag>,
  },
  {
    id: 'rows',
    header: 'Rows in the file',
    value: (row) => row.counts?.rows,
    cell: (row) => (row.counts ? formatCount(row.counts.rows) : '–'),
    numeric: true,
  },
  {
    id: 'entered',
    header: 'Entered',
    value: (row) => row.counts?.entered?.rows,
    cell: (row) => (row.counts?.entered ? formatCount(row.counts.entered.rows) : '–'),
    numeric: true,
  },
  {
    id: 'refused',
    header: 'Refused',
    value: (row) => row.counts?.refused,
    cell: (row) => (row.counts ? formatCount(row.counts.refused) : '–'),
    numeric: true,
  },
  {
    id: 'bytes',
    header: 'Size',
    value: (row) => row.fileBytes,
    cell: (row) => formatBytes(row.fileBytes),
    numeric: true,
  },
  {
    id: 'uploaded',
    header: 'Uploaded',
    value: (row) => row.createdAt,
    cell: (row) => (
      <>
        <InstantText at={row.createdAt} />
        <span className="block text-sm text-ink-2">{row.uploadedByName}</span>
      </>
    ),
    sortable: true,
  },
]
