import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import type { ProtocolVersion } from '#shared/schemas/protocol.ts'
import { useStudy } from '../api/study.ts'
import { AddAnalyteDialog } from '../features/analytes/AddAnalyteDialog.tsx'
import { AnalytesTable } from '../features/analytes/AnalytesTable.tsx'
import { analytesQuery } from '../features/analytes/analytes.api.ts'
import { ProtocolDocumentView } from '../features/protocol/ProtocolDocumentView.tsx'
import { ProtocolVersionsTable } from '../features/protocol/ProtocolVersionsTable.tsx'
import { protocolVersionsQuery } from '../features/protocol/protocol.api.ts'
import { StationParts } from '../features/protocol/StationParts.tsx'
import { useMay } from '../features/studies/useMay.ts'
import { Button } from '../ui/Button.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { CopyableHash } from '../ui/CopyableHash.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { Facts } from '../ui/Facts.tsx'
import { InstantText } from '../ui/InstantText.tsx'
import { Notice } from '../ui/Notice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** What the study set out to show, by version. */
export default function ProtocolPage() {
  const study = useStudy()
  const versions = useQuery(protocolVersionsQuery(study.id))
  const mayAmend = useMay('protocol.amend')
  const [search] = useSearchParams()
  const wanted = Number(search.get('version'))
  const shown = versions.data?.find((each) => each.number === wanted) ?? versions.data?.[0]
  return (
    <>
      <PageHead
        title="Protocol"
        sub={`${study.code}: ${study.title}`}
        actions={mayAmend && <ButtonLink to="amend">Amend the protocol</ButtonLink>}
      />
      <StationParts studyId={study.id} />
      {versions.error && (
        <ErrorNotice
          what="The protocol could not be read"
          error={versions.error}
          onRetry={versions.refetch}
        />
      )}
      {versions.isPending && <SheetSkeleton />}
      {versions.data && shown && <Version version={shown} versions={versions.data} />}
    </>
  )
}

type VersionProps = { version: ProtocolVersion; versions: readonly ProtocolVersion[] }

function Version({ version, versions }: VersionProps) {
  const study = useStudy()
  const analytes = useQuery(analytesQuery(study.id))
  const mayAdd = useMay('analyte.add')
  const [adding, setAdding] = useState(false)
  const newest = versions[0]!
  return (
    <Sheet
      label="About this version"
      margin={
        <>
          <Caution title={study.caution.title}>{study.caution.text}</Caution>
          <Facts
            items={[
              { term: 'Version', value: `${version.number} of ${newest.number}` },
              { term: 'Made', value: <InstantText at={version.createdAt} /> },
              { term: 'By', value: version.createdByName },
              ...(version.reason ? [{ term: 'Why', value: version.reason }] : []),
              {
                term: 'Hash',
                value: <CopyableHash value={version.documentHash} label="protocol hash" />,
              },
            ]}
          />
        </>
      }
    >
      {version !== newest && (
        <div className="mb-5">
          <Notice tone="warn" title={`This is version ${version.number}`}>
            Version {newest.number} holds now.
          </Notice>
        </div>
      )}
      <ProtocolDocumentView document={version.document} analytes={analytes.data ?? []} />
      <section className="mt-7">
        <h2>Analytes</h2>
        {analytes.data && <AnalytesTable analytes={analytes.data} />}
        {mayAdd && (
          <Button kind="quiet" size="small" className="mt-3" onClick={() => setAdding(true)}>
            Add an analyte
          </Button>
        )}
        <AddAnalyteDialog
          studyId={study.id}
          analytes={analytes.data ?? []}
          open={adding}
          onClose={() => setAdding(false)}
        />
      </section>
      <section className="mt-7">
        <h2>Versions</h2>
        <ProtocolVersionsTable versions={versions} shown={version.number} />
      </section>
    </Sheet>
  )
}
