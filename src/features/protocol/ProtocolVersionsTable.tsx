import { Link } from 'react-router-dom'
import type { ProtocolVersion } from '#shared/schemas/protocol.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'

type ProtocolVersionsTableProps = { versions: readonly ProtocolVersion[]; shown: number }

/** All versions with who made them and why; each can be looked at. */
export function ProtocolVersionsTable({ versions, shown }: ProtocolVersionsTableProps) {
  return (
    <StaticTable
      caption="Versions of the protocol"
      columns={[{ header: 'Version' }, { header: 'Made' }, { header: 'By' }, { header: 'Why' }]}
      rows={versions.map((version, index) => ({
        key: version.id,
        cells: [
          version.number === shown ? (
            <b key="number">Version {version.number}, shown above</b>
          ) : (
            <Link
              key="number"
              to={index === 0 ? '?' : `?version=${version.number}`}
              className="link"
            >
              Version {version.number}
            </Link>
          ),
          <InstantText key="at" at={version.createdAt} />,
          version.createdByName,
          version.reason ?? (version.number === 1 ? 'The first version' : '–'),
        ],
      }))}
    />
  )
}
