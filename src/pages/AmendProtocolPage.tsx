import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { type ProtocolVersion, protocolAmendment } from '#shared/schemas/protocol.ts'
import { useStudy } from '../api/study.ts'
import { analytesQuery } from '../features/analytes/analytes.api.ts'
import type { AnalyteOption } from '../features/protocol/analyteOption.ts'
import { BiomarkersSection } from '../features/protocol/BiomarkersSection.tsx'
import { ConditionSection } from '../features/protocol/ConditionSection.tsx'
import { LimitsSection } from '../features/protocol/LimitsSection.tsx'
import { protocolVersionsQuery, useAmendProtocol } from '../features/protocol/protocol.api.ts'
import { SamplingSection } from '../features/protocol/SamplingSection.tsx'
import { StatusSection } from '../features/protocol/StatusSection.tsx'
import { useMay } from '../features/studies/useMay.ts'
import { Form } from '../forms/Form.tsx'
import { FormSection } from '../forms/FormSection.tsx'
import { ReasonField } from '../forms/ReasonField.tsx'
import { Button } from '../ui/Button.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { Notice } from '../ui/Notice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

const WHY = [
  'The plan changed',
  'More sites or subjects',
  'Something was left out',
  'Typing mistake',
]
const amendment = protocolAmendment.omit({ basedOn: true })

/** Writes the next version of the protocol. */
export default function AmendProtocolPage() {
  const study = useStudy()
  const versions = useQuery(protocolVersionsQuery(study.id))
  const analytes = useQuery(analytesQuery(study.id))
  const error = versions.error ?? analytes.error
  return (
    <>
      <PageHead
        title="Amend the protocol"
        sub="A new version takes the place of the one that holds now; the old one stays to be read"
        back={{ to: `/studies/${study.id}/protocol`, label: 'Protocol' }}
      />
      {error && <ErrorNotice what="The protocol could not be read" error={error} />}
      {versions.data && analytes.data ? (
        <Amendment newest={versions.data[0]!} analytes={analytes.data as AnalyteOption[]} />
      ) : (
        !error && <SheetSkeleton />
      )}
    </>
  )
}

type AmendmentProps = { newest: ProtocolVersion; analytes: readonly AnalyteOption[] }

function Amendment({ newest, analytes }: AmendmentProps) {
  const study = useStudy()
  const navigate = useNavigate()
  const amend = useAmendProtocol(study.id)
  const mayAmend = useMay('protocol.amend')
  // What the person saw when beginning; it moves on only when they say that they looked.
  const [basis, setBasis] = useState(newest)
  const back = `/studies/${study.id}/protocol`
  const overtaken = newest.number !== basis.number
  return (
    <Sheet
      label="About this amendment"
      margin={
        <>
          <p>
            You start from version {basis.number} and write version {newest.number + 1}.
          </p>
          <p>
            Analyses name the version that they followed. One that is planned after results were
            seen is shown as such.
          </p>
          <p>
            Sites and people are kept on the page “Sites and team”. Analytes are added on the
            protocol page.
          </p>
        </>
      }
    >
      {overtaken && (
        <div className="mb-5">
          <Notice tone="stop" title={`Version ${newest.number} was made meanwhile`} announce>
            <p>
              By {newest.createdByName}
              {newest.reason ? `, because “${newest.reason}”` : ''}. What you typed is still here.{' '}
              <a href={back} target="_blank" rel="noopener">
                Look at version {newest.number} in a new tab
              </a>
              , then go on.
            </p>
            <Button
              kind="quiet"
              size="small"
              className="mt-2"
              onClick={() => {
                setBasis(newest)
                amend.reset()
              }}
            >
              I have looked: mine takes its place
            </Button>
          </Notice>
        </div>
      )}
      <Form
        schema={amendment}
        defaultValues={{ document: basis.document, reasonForChange: '' }}
        submitLabel="Make the new version"
        dealtWith={basis.number}
        locked={mayAmend ? undefined : lockedBecause(study.lockedAt !== null)}
        onSubmit={(values) => amend.mutateAsync({ ...values, basedOn: basis.number })}
        onSaved={() => navigate(back)}
        onCancel={() => navigate(back)}
      >
        <SamplingSection />
        <ConditionSection />
        <BiomarkersSection analytes={analytes} />
        <LimitsSection analytes={analytes} />
        <StatusSection />
        <FormSection title="Why">
          <ReasonField label="Reason for the amendment" reasons={WHY} />
        </FormSection>
      </Form>
    </Sheet>
  )
}

const lockedBecause = (locked: boolean) =>
  locked
    ? 'The data of this study are locked, and its protocol with them.'
    : 'Only a study lead amends the protocol.'
