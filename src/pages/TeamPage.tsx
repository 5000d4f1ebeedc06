import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import type { Member } from '#shared/schemas/member.ts'
import type { Site } from '#shared/schemas/site.ts'
import { meQuery } from '../api/me.ts'
import { useStudy } from '../api/study.ts'
import { AddMemberDialog } from '../features/members/AddMemberDialog.tsx'
import { EndMemberDialog } from '../features/members/EndMemberDialog.tsx'
import { MembersTable } from '../features/members/MembersTable.tsx'
import { membersQuery } from '../features/members/members.api.ts'
import { StationParts } from '../features/protocol/StationParts.tsx'
import { AddSiteDialog } from '../features/sites/AddSiteDialog.tsx'
import { CorrectSiteDialog } from '../features/sites/CorrectSiteDialog.tsx'
import { SitesTable } from '../features/sites/SitesTable.tsx'
import { sitesQuery } from '../features/sites/sites.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { Button } from '../ui/Button.tsx'
import { Disclosure } from '../ui/Disclosure.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** Where the study is done, and by whom. */
export default function TeamPage() {
  const study = useStudy()
  return (
    <>
      <PageHead title="Sites and team" sub={`${study.code}: ${study.title}`} />
      <StationParts studyId={study.id} />
      <Sites />
      <Team />
    </>
  )
}

function Sites() {
  const study = useStudy()
  const sites = useQuery(sitesQuery(study.id))
  const mayAdd = useMay('site.add')
  const mayCorrect = useMay('site.correct')
  const [adding, setAdding] = useState(false)
  const [chosen, setChosen] = useState<Site | null>(null)
  const correcting = sites.data?.find((site) => site.id === chosen?.id)
  return (
    <Sheet
      label="About sites"
      margin={<p>A site’s prefix begins every subject code there and cannot change.</p>}
    >
      <div className="mb-2 flex flex-wrap items-center gap-3">
        <h2 className="mb-0">Sites</h2>
        {mayAdd && (
          <Button kind="quiet" size="small" className="ml-auto" onClick={() => setAdding(true)}>
            Add a site
          </Button>
        )}
      </div>
      <SitesTable
        sites={sites.data}
        status={sites}
        onCorrect={mayCorrect ? setChosen : undefined}
      />
      <AddSiteDialog studyId={study.id} open={adding} onClose={() => setAdding(false)} />
      {correcting && (
        <CorrectSiteDialog studyId={study.id} site={correcting} onClose={() => setChosen(null)} />
      )}
    </Sheet>
  )
}

function Team() {
  const study = useStudy()
  const me = useQuery(meQuery)
  const members = useQuery(membersQuery(study.id))
  const sites = useQuery(sitesQuery(study.id))
  const mayAdd = useMay('member.add')
  const mayEnd = useMay('member.end')
  const [adding, setAdding] = useState(false)
  const [ending, setEnding] = useState<Member | null>(null)
  const readerId = me.data?.person.id
  const now = useMemo(() => members.data?.filter((line) => line.endsAt === null), [members.data])
  const ended = useMemo(() => members.data?.filter((line) => line.endsAt !== null), [members.data])
  return (
    <Sheet
      label="About the team"
      margin={
        <>
          <p>
            The hospital’s sign-in says who somebody is and which roles they may hold. This list
            says what they do in this study.
          </p>
          <p>One person has one role here, ever. Nobody changes their own place.</p>
          {study.kind === 'earlierData' && (
            <p>In a study of earlier data nobody is blinded, so there are no duties to divide.</p>
          )}
        </>
      }
    >
      <div className="mb-2 flex flex-wrap items-center gap-3">
        <h2 className="mb-0">Team</h2>
        {mayAdd && (
          <Button kind="quiet" size="small" className="ml-auto" onClick={() => setAdding(true)}>
            Add somebody
          </Button>
        )}
      </div>
      <MembersTable
        caption="Team"
        members={now}
        status={members}
        readerId={readerId}
        onEnd={mayEnd ? setEnding : undefined}
      />
      {ended && ended.length > 0 && (
        <div className="mt-4">
          <Disclosure summary={`Places that have ended (${ended.length})`}>
            <MembersTable caption="Ended" members={ended} ended readerId={readerId} />
          </Disclosure>
        </div>
      )}
      <AddMemberDialog
        studyId={study.id}
        kind={study.kind}
        sites={sites.data ?? []}
        readerId={readerId}
        open={adding}
        onClose={() => setAdding(false)}
      />
      {ending && (
        <EndMemberDialog studyId={study.id} member={ending} onClose={() => setEnding(null)} />
      )}
    </Sheet>
  )
}
