import type { Report } from '#shared/schemas/report.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { REPORT_PART_LABELS, type ReportPart } from '#shared/terms/reportState.ts'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { formatBytes } from '../../ui/formatBytes.ts'
import { partAddress } from './reports.api.ts'

type ReportPartCellProps = { report: Report; part: ReportPart; mayOpen: boolean }

/** One part of a report: to open where the reader may, its length, and the hash to check a copy by. */
export function ReportPartCell({ report, part, mayOpen }: ReportPartCellProps) {
  const file = report.files.find((each) => each.part === part)
  if (!file) return <span className="text-ink-2">–</span>
  const pages = `${formatCount(file.pages)} ${file.pages === 1 ? 'page' : 'pages'}`
  return (
    <>
      {mayOpen ? (
        <a
          href={partAddress(report.id, part)}
          target="_blank"
          rel="noreferrer"
          className="link whitespace-nowrap"
        >
          Open the PDF
          <span className="sr-only">
            {` of report ${report.number}, ${REPORT_PART_LABELS[part].toLowerCase()}, in a new tab`}
          </span>
        </a>
      ) : (
        <span>Not open to your role</span>
      )}
      <span className="block text-sm text-ink-2">
        {pages}, {formatBytes(file.bytes)}
      </span>
      <span className="block text-sm text-ink-2">
        <CopyableHash
          value={file.sha256}
          label={`SHA-256 of the ${REPORT_PART_LABELS[part].toLowerCase()} of report ${report.number}`}
        />
      </span>
    </>
  )
}
