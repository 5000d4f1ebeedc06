import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { Site } from '#shared/schemas/site.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Facts } from '../../ui/Facts.tsx'
import { subjectsQuery } from './subjects.api.ts'
import { PRIVACY_WORDS } from './subjectWords.ts'

type SubjectsMarginProps = {
  studyId: string
  /** The sites whose subjects the reader sees. */
  sites: readonly Site[]
  /** Where more data come from; null for whoever brings none in. */
  importTo: string | null
}

/** What is to do, and how many there are at each site. */
export function SubjectsMargin({ studyId, sites, importTo }: SubjectsMarginProps) {
  const withoutSession = useLacking(studyId, 'session')
  const withoutOutcome = useLacking(studyId, 'outcome')
  const toDo = [
    { needs: 'session', count: withoutSession, words: 'without a breath session' },
    { needs: 'outcome', count: withoutOutcome, words: 'without a decided outcome' },
  ].filter((each) => each.count !== undefined && each.count > 0)
  const counted = withoutSession !== undefined && withoutOutcome !== undefined
  return (
    <>
      <Facts
        items={[
          {
            term: 'To do',
            value: (
              <>
                {toDo.map(({ needs, count, words }) => (
                  <Link key={needs} to={`?needs=${needs}`} className="link block min-h-6">
                    {formatCount(count!)} {words}
                  </Link>
                ))}
                {importTo && (
                  <Link to={importTo} className="link block min-h-6">
                    Bring in a file
                  </Link>
                )}
                {toDo.length === 0 && !importTo && (counted ? 'Nothing' : '…')}
              </>
            ),
          },
          ...sites.map((site) => ({
            term: `${site.name}, ${site.prefix}`,
            value: `${formatCount(site.subjectCount)}${
              site.plannedSubjects === null ? '' : ` of ${formatCount(site.plannedSubjects)}`
            }`,
          })),
        ]}
      />
      <p>{PRIVACY_WORDS}</p>
    </>
  )
}

/** How many subjects lack something; the first row is enough to be told the total. */
function useLacking(studyId: string, needs: 'session' | 'outcome'): number | undefined {
  const { data } = useQuery(subjectsQuery(studyId, { needs, limit: '1' }))
  return data?.total
}
