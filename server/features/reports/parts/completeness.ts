import { group } from 'd3-array'
import type { ReportSection } from '#server/reports/reportDocument.ts'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import { formatCount, formatFraction, formatPercent } from '#shared/terms/numbers.ts'
import type { ReportSource } from '../reportSource.ts'

type Has = (sessions: readonly DatasetRow[]) => boolean

/**
 * How many subjects have each thing that the study needs of them. The outcome is told as decided or
 * not, never as present or absent: how often the condition occurs is not for everybody.
 */
export function completenessSection({ rows, dataset }: ReportSource): ReportSection {
  const subjects = [...group(rows, (row) => row.subjectId).values()]
  const all = subjects.length
  const line = (label: string, has: Has): string[] => {
    const complete = subjects.filter(has).length
    return [
      label,
      formatFraction(complete, all),
      all === 0 ? '' : formatPercent(complete / all),
      formatCount(all - complete),
    ]
  }
  const { analytes } = dataset.manifest
  const measured = analytes.filter(({ key }) => rows.some((row) => key in row.referenceValues))
  const sessions = rows.filter((row) => row.session !== null).length
  return {
    heading: 'Completeness',
    blocks: [
      {
        kind: 'table',
        columns: [
          { label: 'Of each subject' },
          { label: 'n/N', align: 'right' },
          { label: 'Share', align: 'right' },
          { label: 'Missing', align: 'right' },
        ],
        rows: [
          line('A breath session', (own) => own.some((row) => row.session !== null)),
          ...analytes.map(({ key, name }) =>
            line(`${name}, sensor value`, (own) => own.some((row) => key in row.sensorValues)),
          ),
          ...measured.map(({ key, name }) =>
            line(`${name}, reference analyser value`, (own) =>
              own.some((row) => key in row.referenceValues),
            ),
          ),
          line('Reference outcome decided', ([row]) => isDecided(row)),
          line('Sex', ([row]) => row?.sex != null && row.sex !== 'unknown'),
          line('Age band', ([row]) => row?.ageBand != null),
        ],
      },
      {
        kind: 'paragraph',
        quiet: true,
        text: `${formatCount(sessions)} breath sessions in all; ${formatCount(subjects.filter((own) => own.length > 1).length)} subjects have more than one. Reference outcomes left open: ${openOutcomes(subjects)}.`,
      },
    ],
  }
}

const isDecided = (row: DatasetRow | undefined): boolean =>
  row?.outcome === 'present' || row?.outcome === 'absent'

function openOutcomes(subjects: readonly (readonly DatasetRow[])[]): string {
  const count = (outcome: DatasetRow['outcome']) =>
    formatCount(subjects.filter(([row]) => row?.outcome === outcome).length)
  return `${count('indeterminate')} indeterminate, ${count('notDone')} not done, ${count(null)} not recorded`
}
