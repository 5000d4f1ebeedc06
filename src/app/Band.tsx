import { useMutation, useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { Role } from '#shared/policy/people.ts'
import { meQuery } from '../api/me.ts'
import { signOut } from '../api/signOut.ts'
import { useLeaveAfterAsking } from '../forms/UnsavedWork.tsx'
import { BreathMark } from './BreathMark.tsx'
import { useNightTheme } from './nightTheme.ts'
import { PrintedHead } from './PrintedHead.tsx'
import { SavedState } from './SavedState.tsx'

type BandProps = {
  study?: { code: string; title: string; to: string }
  /** The reader's roles here: in this study, or as the identity provider gives them. */
  roles: readonly Role[]
}

const ROLE_WORDS: Record<Role, string> = {
  coordinator: 'Coordinator',
  monitor: 'Monitor',
  analyst: 'Analyst',
}

/** The roles, unless the name that the hospital gives says them already. */
function rolesBeside(name: string, roles: readonly Role[]): string {
  const words = roles.map((role) => ROLE_WORDS[role])
  return words
    .filter((word) => !name.toLowerCase().includes(word.toLowerCase()))
    .map((word) => `, ${word}`)
    .join('')
}

/** Top of every page: whose product, which study, whether all is saved, who is at work. */
export function Band({ study, roles }: BandProps) {
  const me = useQuery(meQuery)
  const [night, setNight] = useNightTheme()
  const leave = useMutation({ mutationFn: signOut, meta: { quiet: true } })
  const leaveAfterAsking = useLeaveAfterAsking()
  return (
    <>
      <PrintedHead study={study} reader={me.data?.person.name} />
      <header className="flex min-h-12 flex-wrap items-center gap-x-5 gap-y-1.5 bg-band px-7 py-2 text-band-ink max-wide:px-4 print:hidden [&_:focus-visible]:outline-band-ink">
        <Link
          to="/"
          className="flex items-center gap-2 text-lg font-bold text-inherit no-underline"
          aria-label="Breathmark, all studies"
        >
          <BreathMark className="h-[26px] w-4 text-[var(--band-mark)]" />
          Breathmark
        </Link>
        {study && (
          <Link
            to={study.to}
            className="min-w-0 text-inherit no-underline hover:underline wide:border-l wide:border-band-rule wide:pl-5"
          >
            <b className="mr-2 font-bold">{study.code}</b>
            {study.title}
          </Link>
        )}
        <div className="ml-auto flex min-w-0 flex-wrap items-center gap-x-5 gap-y-1 text-sm text-band-ink-2">
          <SavedState />
          {me.data && (
            <span>
              {me.data.person.name}
              {rolesBeside(me.data.person.name, roles)}
            </span>
          )}
          <button
            type="button"
            onClick={() => setNight(!night)}
            className="min-h-6 text-band-ink underline underline-offset-2"
          >
            {night ? 'Day' : 'Night'}
            <span className="sr-only"> colours</span>
          </button>
          <button
            type="button"
            onClick={() => leaveAfterAsking(() => leave.mutateAsync())}
            disabled={leave.isPending}
            className="min-h-6 text-band-ink underline underline-offset-2"
          >
            {leave.isError ? 'Sign out: try again' : 'Sign out'}
          </button>
        </div>
      </header>
    </>
  )
}
