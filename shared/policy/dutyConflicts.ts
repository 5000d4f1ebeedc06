import type { Duty } from './people.ts'

/**
 * Pairs of duties that would let one person know both classes before release, or check what they
 * themselves entered.
 */
const CONFLICTS: readonly (readonly [Duty, Duty])[] = [
  ['bedside', 'reference'],
  ['bedside', 'studyLead'],
  ['reference', 'studyLead'],
  ['verifyIndex', 'verifyReference'],
  ['verifyIndex', 'oversight'],
  ['verifyReference', 'oversight'],
]

/** The duty among those ever carried in a study that keeps a person from another one, or null. */
export function conflictingDuty(duty: Duty, carried: readonly Duty[]): Duty | null {
  return (
    carried.find((each) =>
      CONFLICTS.some(([a, b]) => (a === duty && b === each) || (b === duty && a === each)),
    ) ?? null
  )
}
