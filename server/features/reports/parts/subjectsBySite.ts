import type { ReportSection } from '#server/reports/reportDocument.ts'
import { formatCount, formatPercent } from '#shared/terms/numbers.ts'
import type { ReportSource } from '../reportSource.ts'

const NOT_PLANNED = 'not planned'

/** Numbers of frozen subjects by site against the plan. */
export function subjectsBySite({ sites, rows, dataset }: ReportSource): ReportSection {
  const bySite = new Map<string, Set<string>>()
  for (const row of rows) {
    const there = bySite.get(row.site) ?? new Set()
    bySite.set(row.site, there.add(row.subjectId))
  }
  const lines = sites.map(({ name, prefix, plannedSubjects }) => {
    const enrolled = bySite.get(prefix)?.size ?? 0
    return [`${name} (${prefix})`, ...against(enrolled, plannedSubjects)]
  })
  const { plannedSubjects } = dataset.protocol
  return {
    heading: 'Subjects by site',
    blocks: [
      {
        kind: 'table',
        columns: [
          { label: 'Site' },
          { label: 'Subjects', align: 'right' },
          { label: 'Planned', align: 'right' },
          { label: 'Share of the plan', align: 'right' },
        ],
        rows: [...lines, ['All sites', ...against(dataset.subjectCount, plannedSubjects)]],
      },
    ],
  }
}

const against = (enrolled: number, planned: number | null): [string, string, string] => [
  formatCount(enrolled),
  planned === null ? NOT_PLANNED : formatCount(planned),
  planned === null ? '' : formatPercent(enrolled / planned),
]
