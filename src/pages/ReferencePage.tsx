import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import { formatCount } from '#shared/terms/numbers.ts'
import { OUTCOME_LABELS, OUTCOMES } from '#shared/terms/outcome.ts'
import { useStudy } from '../api/study.ts'
import { analytesQuery } from '../features/analytes/analytes.api.ts'
import { protocolVersionsQuery } from '../features/protocol/protocol.api.ts'
import { referenceQuery } from '../features/reference/reference.api.ts'
import { measuredAnalytes, referenceColumns } from '../features/reference/referenceColumns.tsx'
import { sitesQuery } from '../features/sites/sites.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { CodeAndSiteFilter } from '../features/subjects/CodeAndSiteFilter.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { Facts } from '../ui/Facts.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { TableChoice } from '../ui/TableFilters.tsx'
import { useTableParams } from '../ui/useTableParams.ts'

const FILTERS = ['code', 'siteId', 'outcome'] as const
/** With more columns than this the table scrolls in a box of its own. */
const WIDE_FROM = 8

/** Outcomes and the reference analyser's values, by subject, as they were entered. */
export default function ReferencePage() {
  const { counts } = useStudy()
  const mayList = useMay('reference.list')
  return (
    <>
      <PageHead
        title="Reference"
        sub="Outcomes and values of the reference analyser as they were entered"
      />
      {mayList ? (
        <ReferenceList />
      ) : (
        <Sheet>
          <EmptyPlace title="Outcomes and analyser values are not open to your place in this study">
            {formatCount(counts.decidedOutcomes)}{' '}
            {counts.decidedOutcomes === 1 ? 'outcome is' : 'outcomes are'} decided.
          </EmptyPlace>
        </Sheet>
      )}
    </>
  )
}

function ReferenceList() {
  const study = useStudy()
  const params = useTableParams({ filters: FILTERS })
  const reference = useQuery(referenceQuery(study.id, params.request))
  const analytes = useQuery(analytesQuery(study.id))
  const sites = useQuery(sitesQuery(study.id))
  const protocol = useQuery(protocolVersionsQuery(study.id))
  const mayImport = useMay('import.upload')
  const severalSites = (sites.data?.length ?? 0) > 1
  const columns = useMemo(
    () =>
      referenceColumns(
        measuredAnalytes(reference.data?.items ?? [], analytes.data ?? []),
        severalSites,
      ),
    [reference.data, analytes.data, severalSites],
  )
  const document = protocol.data?.[0]?.document
  return (
    <Sheet
      label="About the reference"
      margin={
        <>
          <Caution title={study.caution.title}>{study.caution.text}</Caution>
          {document && (
            <Facts
              items={[
                { term: 'Target condition', value: document.targetCondition },
                { term: 'Decided by', value: document.referenceStandard },
              ]}
            />
          )}
          <p>Every digit is shown as it was entered.</p>
        </>
      }
    >
      <DataTable
        caption="Reference by subject"
        hideCaption
        columns={columns}
        rows={reference.data?.items}
        rowId={(row) => row.subjectId}
        params={params}
        order="server"
        page={reference.data}
        status={reference}
        scroll={columns.length > WIDE_FROM}
        filters={
          study.counts.subjects > 0 ? (
            <>
              <CodeAndSiteFilter params={params} sites={sites.data ?? []} />
              <TableChoice
                params={params}
                name="outcome"
                label="Outcome"
                options={OUTCOMES.map((value) => ({ value, label: OUTCOME_LABELS[value] }))}
              />
            </>
          ) : undefined
        }
        empty={
          <EmptyPlace
            title="Nothing of the reference yet"
            action={mayImport && <ButtonLink to="../imports">Bring in a file</ButtonLink>}
          >
            {study.counts.decidedOutcomes > 0
              ? 'Nothing is entered at the sites that you see.'
              : 'Outcomes and analyser values come in with the file of earlier data.'}
          </EmptyPlace>
        }
      />
    </Sheet>
  )
}
