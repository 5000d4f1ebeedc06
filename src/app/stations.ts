import type { Study } from '#shared/schemas/study.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import type { Station } from './Course.tsx'

type StationPlan = {
  key: string
  label: string
  count: (study: Study) => string
  /** Other first parts of an address that belong to this station. */
  also?: readonly string[]
}

/** The course of a study, in order. The exhalation ends at the lock: nothing is added after it. */
const PLAN: readonly StationPlan[] = [
  {
    key: 'protocol',
    label: 'Protocol',
    count: ({ counts }) => `version ${counts.protocolVersion}`,
    also: ['team', 'sites', 'analytes'],
  },
  {
    key: 'subjects',
    label: 'Subjects',
    count: ({ counts: { subjects, plannedSubjects } }) =>
      plannedSubjects === null
        ? formatCount(subjects)
        : `${formatCount(subjects)} of ${formatCount(plannedSubjects)}`,
    also: ['imports'],
  },
  {
    key: 'sessions',
    label: 'Sessions',
    count: ({ counts }) => `${formatCount(counts.sessions)} recorded`,
  },
  {
    key: 'reference',
    label: 'Reference',
    count: ({ counts }) => `${formatCount(counts.decidedOutcomes)} decided`,
  },
  {
    key: 'review',
    label: 'Review',
    count: ({ counts }) => `${formatCount(counts.auditEvents)} in the trail`,
    also: ['audit'],
  },
  { key: 'lock', label: 'Lock', count: lockStanding },
  {
    key: 'results',
    label: 'Results',
    count: ({ counts }) =>
      counts.locks === 0 ? 'after the lock' : countOf(counts.analyses, 'analysis', 'analyses'),
  },
  {
    key: 'reports',
    label: 'Reports',
    count: ({ counts }) => `${formatCount(counts.reports)} issued`,
  },
]

export const COURSE_ENDS_AT = 'lock'

export function stationsOf(study: Study): Station[] {
  return PLAN.map(({ key, label, count }) => ({
    key,
    label,
    count: count(study),
    to: `/studies/${study.id}/${key}`,
  }))
}

/** @param part the part of the address after the study: "subjects" */
export function stationOf(part: string | undefined): string | null {
  const plan = PLAN.find(({ key, also }) => key === part || also?.includes(part ?? ''))
  return plan?.key ?? null
}

function lockStanding({ lockedAt, counts }: Study): string {
  if (lockedAt !== null) return 'locked'
  if (counts.openLockRequest) return 'asked for'
  return counts.locks === 0 ? 'open' : countOf(counts.locks, 'data cut', 'data cuts')
}

function countOf(count: number, one: string, many: string): string {
  return `${formatCount(count)} ${count === 1 ? one : many}`
}
