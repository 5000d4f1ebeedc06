import type { Allowed } from '#server/changes/targets.ts'
import { INFORMATION_CLASSES, maySee } from '#shared/policy/informationClasses.ts'
import type { Subject } from '#shared/schemas/subject.ts'
import type { SubjectRow } from './subjects.reads.ts'

/** A subject as it goes out to this reader. */
export const toSubject = (row: SubjectRow, allowed: Allowed): Subject => ({
  ...row,
  covariates: seesLinked(allowed) ? row.covariates : {},
  enrolledAt: row.enrolledAt.toISOString(),
})

/** Covariates may hold values of either class, so they are shown to those alone who may see all. */
function seesLinked({ kind, memberships, released }: Allowed): boolean {
  return (
    kind === 'earlierData' ||
    memberships.some(({ role, duty }) =>
      INFORMATION_CLASSES.every((each) => maySee(role, duty, each, released)),
    )
  )
}
