import { useQuery } from '@tanstack/react-query'
import { useEffect, useMemo, useRef, useState } from 'react'
import { useLocation, useParams } from 'react-router-dom'
import type { Subject } from '#shared/schemas/subject.ts'
import { formatDate } from '#shared/terms/numbers.ts'
import { useStudy } from '../api/study.ts'
import { analytesQuery } from '../features/analytes/analytes.api.ts'
import { referenceQuery } from '../features/reference/reference.api.ts'
import { SubjectReference } from '../features/reference/SubjectReference.tsx'
import { ownSessionColumns } from '../features/sessions/sessionColumns.tsx'
import { sessionsQuery } from '../features/sessions/sessions.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { SubjectCorrection } from '../features/subjects/SubjectCorrection.tsx'
import { SubjectFacts } from '../features/subjects/SubjectFacts.tsx'
import { subjectQuery } from '../features/subjects/subjects.api.ts'
import { PRIVACY_WORDS } from '../features/subjects/subjectWords.ts'
import { Button } from '../ui/Button.tsx'
import { Caution } from '../ui/Caution.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { Facts } from '../ui/Facts.tsx'
import { InstantText } from '../ui/InstantText.tsx'
import { Notice } from '../ui/Notice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton, Skeleton } from '../ui/Skeleton.tsx'

/** One subject: what is recorded, and the values that the reader may know. */
export default function SubjectPage() {
  const study = useStudy()
  const { subjectId = '' } = useParams()
  const subject = useQuery(subjectQuery(study.id, subjectId))
  // A subject that is not there gets the page for addresses without a page.
  if (subject.error && !subject.data && 'status' in subject.error && subject.error.status === 404)
    throw subject.error
  return (
    <>
      <PageHead
        title={subject.data?.code ?? 'Subject'}
        sub={
          subject.data &&
          `${subject.data.siteName}, ${study.kind === 'earlierData' ? 'entered' : 'enrolled'} ${formatDate(subject.data.enrolledAt)}`
        }
        back={{ to: `/studies/${study.id}/subjects`, label: 'Subjects' }}
      />
      {subject.error && (
        <ErrorNotice
          what="The subject could not be read"
          error={subject.error}
          onRetry={subject.refetch}
        />
      )}
      {subject.isPending && <SheetSkeleton />}
      {/* The key keeps one subject's values from standing under another's code, even for a moment. */}
      {subject.data && <Opened key={subject.data.id} subject={subject.data} />}
    </>
  )
}

function Opened({ subject }: { subject: Subject }) {
  const study = useStudy()
  const { state } = useLocation()
  const maySeeSessions = useMay('session.list', { siteId: subject.siteId })
  const maySeeReference = useMay('reference.list', { siteId: subject.siteId })
  return (
    <Sheet
      label="About this subject"
      margin={
        <>
          {(maySeeSessions || maySeeReference) && (
            <Caution title={study.caution.title}>{study.caution.text}</Caution>
          )}
          <Facts
            items={[
              { term: 'Site', value: subject.siteName },
              { term: 'Entered', value: <InstantText at={subject.enrolledAt} /> },
              {
                term: 'Came in',
                value:
                  subject.importNumber === null ? 'By hand' : `With file ${subject.importNumber}`,
              },
              {
                term: 'Corrected',
                value: timesWords(subject.version - 1),
              },
            ]}
          />
          <p>{PRIVACY_WORDS}</p>
        </>
      }
    >
      {(state as { enrolled?: boolean } | null)?.enrolled && (
        <div className="mb-5">
          <Notice tone="good" title={`Enrolled under ${subject.code}`} announce>
            Write this code into your site file now, beside the person it belongs to.
          </Notice>
        </div>
      )}
      <Recorded subject={subject} />
      <section className="mt-7">
        <h2>Breath sessions</h2>
        {maySeeSessions ? (
          <Sessions subjectId={subject.id} />
        ) : (
          <NotOpen what="Sensor values" count={subject.sessionCount} one="session" />
        )}
      </section>
      <section className="mt-7">
        <h2>Reference</h2>
        {maySeeReference ? (
          <OwnReference subjectId={subject.id} />
        ) : (
          <NotOpen what="Outcome and analyser values" />
        )}
      </section>
    </Sheet>
  )
}

const timesWords = (times: number): string => ['never', 'once', 'twice'][times] ?? `${times} times`

function Recorded({ subject }: { subject: Subject }) {
  const study = useStudy()
  const mayCorrect = useMay('subject.correct', { siteId: subject.siteId })
  const [correcting, setCorrecting] = useState(false)
  const button = useRef<HTMLButtonElement>(null)
  // The form takes the pressed button's place; when it goes, the focus returns to the button.
  const wasCorrecting = useRef(false)
  useEffect(() => {
    if (wasCorrecting.current && !correcting) button.current?.focus()
    wasCorrecting.current = correcting
  }, [correcting])
  return (
    <section>
      <div className="mb-2 flex flex-wrap items-center gap-3">
        <h2 className="mb-0">Recorded</h2>
        {mayCorrect && !correcting && (
          <Button ref={button} kind="quiet" size="small" onClick={() => setCorrecting(true)}>
            Correct
          </Button>
        )}
      </div>
      {correcting ? (
        <SubjectCorrection
          studyId={study.id}
          subject={subject}
          onDone={() => setCorrecting(false)}
        />
      ) : (
        <SubjectFacts subject={subject} />
      )}
    </section>
  )
}

function Sessions({ subjectId }: { subjectId: string }) {
  const study = useStudy()
  const analytes = useQuery(analytesQuery(study.id))
  const sessions = useQuery(sessionsQuery(study.id, { subjectId, limit: '200' }))
  const columns = useMemo(() => ownSessionColumns(analytes.data ?? []), [analytes.data])
  return (
    <DataTable
      caption="Breath sessions"
      hideCaption
      columns={columns}
      rows={sessions.data?.items}
      rowId={(session) => session.id}
      status={sessions}
      empty={<p className="text-ink-2">None recorded.</p>}
    />
  )
}

function OwnReference({ subjectId }: { subjectId: string }) {
  const study = useStudy()
  const analytes = useQuery(analytesQuery(study.id))
  const reference = useQuery(referenceQuery(study.id, { subjectId }))
  if (reference.error)
    return <ErrorNotice what="The reference could not be read" error={reference.error} />
  if (!reference.data || !analytes.data) return <Skeleton lines={2} />
  return <SubjectReference reference={reference.data.items[0]} analytes={analytes.data} />
}

function NotOpen({ what, count, one }: { what: string; count?: number; one?: string }) {
  return (
    <p className="text-ink-2">
      {what} are not open to your place in this study.
      {count !== undefined && ` ${count} ${one}${count === 1 ? '' : 's'} recorded.`}
    </p>
  )
}
