import type { ReactNode } from 'react'
import type { ImportEntry, ImportMapping, ImportRow } from '#shared/schemas/import.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Site } from '#shared/schemas/site.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { OUTCOME_LABELS } from '#shared/terms/outcome.ts'
import type { TableColumn } from '../../ui/tableColumn.ts'

type Terms = { mapping: ImportMapping; analytes: readonly Analyte[]; sites: readonly Site[] }
type Cell = (entry: ImportEntry) => ReactNode

/** Enough digits to show a value as it stands in the file. */
const ALL_DIGITS = 12

/** The columns of an entry, in the order of the study and not of the file. */
export function entryColumns({ mapping, analytes, sites }: Terms): TableColumn<ImportRow>[] {
  const meanings = mapping.columns.map((column) => column.meaning)
  const has = (as: string) => meanings.some((meaning) => meaning.as === as)
  const siteName = new Map(sites.map((site) => [site.id, site.name]))
  const column = (id: string, header: string, cell: Cell, numeric = false) => ({
    id,
    header,
    value: (row: ImportRow) => row.line,
    cell: (row: ImportRow) => (row.entry ? cell(row.entry) : MISSING),
    numeric,
  })
  const label = (key: string, what: string) => {
    const analyte = analytes.find((each) => each.key === key)
    const unit = analyte ? unitLabel(analyte.unit) : ''
    return `${analyte?.name ?? key}${what}${unit ? `, ${unit}` : ''}`
  }
  return [
    { id: 'line', header: 'Line', value: (row) => row.line, numeric: true },
    column('subject', 'Subject in the file', (entry) => entry.subjectWord),
    ...(has('site')
      ? [column('site', 'Site', (entry) => siteName.get(entry.siteId) ?? MISSING)]
      : []),
    column('session', 'Session', (entry) => entry.sessionNumber, true),
    ...(has('sex') ? [column('sex', 'Sex', (entry) => entry.sex ?? MISSING)] : []),
    ...(has('ageYears') || has('ageBand')
      ? [column('age', 'Age band', (entry) => entry.ageBand?.replace('-', '–') ?? MISSING)]
      : []),
    ...(has('outcome')
      ? [
          column('outcome', 'Outcome', (entry) =>
            entry.outcome ? OUTCOME_LABELS[entry.outcome] : MISSING,
          ),
        ]
      : []),
    ...meanings.flatMap((meaning) => {
      if (meaning.as === 'sensorValue')
        return [
          column(
            `sensor ${meaning.analyteKey}`,
            label(meaning.analyteKey, ''),
            (entry) => sensorValue(entry.sensorValues[meaning.analyteKey]),
            true,
          ),
        ]
      if (meaning.as === 'referenceValue')
        return [
          column(
            `reference ${meaning.analyteKey}`,
            label(meaning.analyteKey, ' by reference'),
            (entry) => numberText(entry.referenceValues[meaning.analyteKey]),
            true,
          ),
        ]
      if (meaning.as === 'covariate')
        return [
          column(`covariate ${meaning.key}`, meaning.key, (entry) => {
            const value = entry.covariates[meaning.key]
            return typeof value === 'string' ? value : numberText(value)
          }),
        ]
      return []
    }),
  ]
}

const MISSING = (
  <span className="text-ink-2">
    <span aria-hidden="true">–</span>
    <span className="sr-only">missing</span>
  </span>
)

const numberText = (value: number | undefined): ReactNode =>
  value === undefined ? MISSING : formatConcentration(value, ALL_DIGITS)

const sensorValue = (value: ImportEntry['sensorValues'][string] | undefined): ReactNode =>
  value === undefined ? (
    MISSING
  ) : (
    <>
      {numberText(value.value)}
      {value.belowLod && <span className="text-sm text-ink-2"> below LoD</span>}
    </>
  )
