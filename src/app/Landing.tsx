import { useLocation } from 'react-router-dom'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { Notice } from '../ui/Notice.tsx'
import { BreathMark } from './BreathMark.tsx'
import { COURSE_HEIGHT_PX, COURSE_WIDTH, courseCurve } from './courseCurve.ts'
import { signInAddress } from './signIn.ts'

/** What somebody sees who is not signed in. */
export function Landing() {
  const { pathname, search } = useLocation()
  const params = new URLSearchParams(search)
  const refused = params.get('signIn') === 'refused'
  const { path } = courseCurve(8, 5)
  const { title, text } = CAUTIONS.researchUse
  return (
    <div className="flex min-h-dvh flex-col">
      <div className="h-2 bg-band" />
      <main className="mx-auto flex w-full max-w-3xl flex-1 flex-col justify-center px-7 py-12 max-tablet:px-4">
        <h1 className="mb-6 flex items-center gap-3 text-[32px]">
          <BreathMark className="h-[52px] w-8 text-copper" />
          Breathmark
        </h1>
        <svg
          viewBox={`0 0 ${COURSE_WIDTH} ${COURSE_HEIGHT_PX}`}
          preserveAspectRatio="none"
          aria-hidden="true"
          className="mb-8 h-12 w-full overflow-visible"
        >
          <path
            d={path}
            fill="none"
            className="stroke-rule-2"
            strokeWidth="1.6"
            vectorEffect="non-scaling-stroke"
          />
        </svg>
        <p className="mb-8 max-w-[46ch] text-xl">
          For hospital teams who find out whether a breath-gas sensor can tell disease from health,
          and whether it reads the same as a laboratory analyser.
        </p>
        {refused && (
          <div className="mb-6 max-w-[60ch]">
            <Notice tone="stop" title="You were not signed in" announce>
              The sign-in was not completed, so nobody was let in. Please try again. When it happens
              again, report the number <code className="font-mono">{params.get('request')}</code>.
            </Notice>
          </div>
        )}
        <div className="mb-10">
          <ButtonLink href={signInAddress(refused ? '/' : pathname + search)} size="large">
            Sign in with your hospital account
          </ButtonLink>
        </div>
        <div className="max-w-[60ch]">
          <Caution title={title}>{text}</Caution>
        </div>
      </main>
    </div>
  )
}
