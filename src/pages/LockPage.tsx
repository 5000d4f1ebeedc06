import { useQuery } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import type { LockPage as LockStanding } from '#shared/schemas/lock.ts'
import { formatCount, formatDate } from '#shared/terms/numbers.ts'
import { meQuery } from '../api/me.ts'
import { may, useStudy } from '../api/study.ts'
import { LockActions } from '../features/locks/LockActions.tsx'
import { LockChecklist } from '../features/locks/LockChecklist.tsx'
import { LockHistory } from '../features/locks/LockHistory.tsx'
import { LockSignature } from '../features/locks/LockSignature.tsx'
import { lockPageQuery } from '../features/locks/locks.api.ts'
import { SignLockDialog } from '../features/locks/SignLockDialog.tsx'
import { SIGN_PARAMETER } from '../features/locks/signLock.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { CopyableHash } from '../ui/CopyableHash.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { Facts } from '../ui/Facts.tsx'
import { InstantText } from '../ui/InstantText.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** Lock: the checklist, who asked, who signs, and what stands frozen. */
export default function LockPage() {
  const study = useStudy()
  const standing = useQuery(lockPageQuery(study.id))
  const me = useQuery(meQuery)
  const [search, setSearch] = useSearchParams()
  if (!standing.data)
    return (
      <>
        <PageHead title="Lock" />
        {standing.error ? (
          <ErrorNotice
            what="The lock could not be read"
            error={standing.error}
            onRetry={() => void standing.refetch()}
          />
        ) : (
          <SheetSkeleton />
        )}
      </>
    )
  const { locks, checklist, caution, lockedAt } = standing.data
  const open = locks.find((lock) => lock.state === 'requested') ?? null
  const approved = locks.find((lock) => lock.state === 'approved') ?? null
  const leaveSigning = () => setSearch({}, { replace: true })
  const resultsLink = may(study, 'analysis.list') ? (
    <ButtonLink to={`/studies/${study.id}/results`}>Go to the results</ButtonLink>
  ) : undefined
  const signing = open !== null && search.get(SIGN_PARAMETER) === open.id
  return (
    <>
      <PageHead
        {...headOf(standing.data)}
        actions={
          lockedAt === null ? (
            <LockActions open={open} checklist={checklist} readerId={me.data?.person.id} />
          ) : (
            resultsLink
          )
        }
      />
      <Sheet margin={<Margin standing={standing.data} />} label="About the lock">
        {approved && <LockSignature lock={approved} />}
        <LockChecklist
          studyId={study.id}
          checks={approved?.checklist ?? checklist}
          past={approved !== null}
        />
        <LockHistory locks={locks.filter((lock) => lock !== open && lock !== approved)} />
        <div className="mt-5">
          <Caution title={caution.title}>
            {approved
              ? 'The data are frozen. They cannot be opened again by one person.'
              : 'Approving asks you to sign in again. It cannot be undone by one person.'}
          </Caution>
        </div>
      </Sheet>
      {open && (
        <SignLockDialog
          studyId={study.id}
          lock={open}
          signer={me.data?.person.name ?? ''}
          open={signing && may(study, 'lock.approve')}
          onClose={leaveSigning}
          onSigned={leaveSigning}
        />
      )}
    </>
  )
}

function headOf({ locks, lockedAt }: LockStanding): { title: string; sub: string } {
  const [latest] = locks
  if (lockedAt !== null)
    return {
      title: `Final lock, signed on ${formatDate(lockedAt)}`,
      sub: 'The data of this study are frozen. Nobody can change them.',
    }
  if (latest?.state === 'requested')
    return {
      title: `Final lock, asked for on ${formatDate(latest.requestedAt)}`,
      sub: 'Freezes the data as they stand when it is signed, and closes the study to every change.',
    }
  return {
    title: 'Not locked',
    sub: 'Results come after the lock: a study lead asks for it, and a monitor approves and signs it.',
  }
}

function Margin({ standing }: { standing: LockStanding }) {
  const study = useStudy()
  const { locks, auditCount, auditHeadHash } = standing
  const approved = locks.find((lock) => lock.state === 'approved')
  const asked = approved ?? locks.find((lock) => lock.state === 'requested')
  return (
    <Facts
      items={[
        ...(asked
          ? [
              {
                term: 'Asked for by',
                value: (
                  <>
                    {asked.requestedByName}
                    <br />
                    <InstantText at={asked.requestedAt} />
                    {asked.requestNote && <p className="mt-1 text-ink-2">“{asked.requestNote}”</p>}
                  </>
                ),
              },
            ]
          : []),
        ...(approved?.datasetHash
          ? [
              {
                term: 'Dataset',
                value: <CopyableHash value={approved.datasetHash} label="dataset hash" />,
              },
            ]
          : []),
        { term: 'Protocol', value: `version ${study.counts.protocolVersion}` },
        {
          term: 'Trail head',
          value: (
            <>
              {formatCount(auditCount)} · <CopyableHash value={auditHeadHash} label="trail head" />
            </>
          ),
        },
        {
          term: 'Will be able to read it',
          value:
            study.kind === 'earlierData'
              ? 'Analysts and study leads; monitors receive the reports.'
              : 'The analyst that the protocol names.',
        },
      ]}
    />
  )
}
