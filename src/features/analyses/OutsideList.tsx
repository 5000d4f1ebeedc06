import { useId, useMemo } from 'react'
import { Link } from 'react-router-dom'
import { lineUnit } from '#shared/analyses/agreementTables.ts'
import { LOOK, outsideLimits } from '#shared/analyses/outsideLimits.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { withUnit } from '#shared/terms/resultText.ts'
import { useStudy } from '../../api/study.ts'
import type { AgreementShown } from './agreementShown.ts'

/** So many pairs are listed; all of them stand in the numbers of the figure. */
const MOST_LISTED = 20

/** The pairs outside the limits by subject, each with a way to the subject. */
export function OutsideList({ shown }: { shown: AgreementShown }) {
  const id = useId()
  const study = useStudy()
  const { pairs, figures, unit } = shown
  const outside = useMemo(() => outsideLimits(pairs, figures), [pairs, figures])
  const shownIn = lineUnit(figures, unit)
  return (
    <section aria-labelledby={id} className="mt-6 min-w-0">
      <h2 id={id}>Outside the limits</h2>
      <p className="text-sm text-ink-2">
        {outside.length === 0
          ? 'No pair lies outside the limits.'
          : `${formatCount(outside.length)} of ${formatCount(pairs.sensor.length)} pairs. ${LOOK}`}
      </p>
      <ul className="mt-2 flex flex-wrap gap-x-6 gap-y-1.5 text-sm">
        {outside.slice(0, MOST_LISTED).map((pair) => (
          <li key={`${pair.subject} ${pair.mean} ${pair.difference}`}>
            <Link className="link font-mono" to={`/studies/${study.id}/subjects/${pair.subjectId}`}>
              {pair.subject}
            </Link>{' '}
            {withUnit(formatConcentration(pair.difference, 3), shownIn)}, {pair.side}
          </li>
        ))}
      </ul>
      {outside.length > MOST_LISTED && (
        <p className="mt-1.5 text-sm text-ink-2">
          The {formatCount(MOST_LISTED)} furthest out are listed.
        </p>
      )}
    </section>
  )
}
