import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { permitsInstallation } from '#shared/policy/permits.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { meQuery } from '../api/me.ts'
import { studiesQuery } from '../features/studies/studies.api.ts'
import { studyColumns } from '../features/studies/studyColumns.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** The studies in which the reader has a place. */
export default function StudiesPage() {
  const me = useQuery(meQuery)
  const studies = useQuery(studiesQuery)
  const maySetUp = permitsInstallation('study.create', me.data?.person.roles ?? [])
  const setUp = maySetUp && <ButtonLink to="/studies/new">Set up a study</ButtonLink>
  const count = studies.data?.length
  return (
    <>
      <PageHead
        title="Your studies"
        sub={
          count
            ? `You have a place in the team of ${count === 1 ? 'one study' : `${formatCount(count)} studies`}`
            : undefined
        }
        actions={count ? setUp : undefined}
      />
      <Sheet
        label="About these studies"
        margin={
          <>
            <Caution title={CAUTIONS.researchUse.title}>{CAUTIONS.researchUse.text}</Caution>
            <p>You see the studies whose team list names you. A study lead adds you to one.</p>
          </>
        }
      >
        <DataTable
          caption="Your studies"
          hideCaption
          columns={studyColumns}
          rows={studies.data}
          rowId={(study) => study.id}
          status={studies}
          empty={
            <EmptyPlace title="You have no place in a study yet" action={setUp || undefined}>
              {maySetUp
                ? 'Set up a study of earlier data, or ask the lead of a study to add you to its team.'
                : 'Ask the lead of a study to add you to its team.'}
            </EmptyPlace>
          }
        />
        <section aria-labelledby="tools" className="mt-7 border-t border-rule pt-5">
          <h2 id="tools">Tools</h2>
          <ul className="flex flex-wrap gap-x-10 gap-y-3">
            <li className="max-w-[38ch]">
              <Link to="/planning">Plan a study</Link>
              <p className="text-sm text-ink-2">
                Sample sizes, power, and what sensor noise costs. Stores nothing.
              </p>
            </li>
            <li className="max-w-[38ch]">
              <Link to="/sensor">Characterise a sensor</Link>
              <p className="text-sm text-ink-2">
                Calibration, limits, noise over time, uncertainty. Stores nothing.
              </p>
            </li>
          </ul>
        </section>
      </Sheet>
    </>
  )
}
