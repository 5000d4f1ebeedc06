import type { Subject } from '#shared/schemas/subject.ts'
import type { SubjectRow } from './subjects.reads.ts'

/** A subject as it goes out. */
export const toSubject = (row: SubjectRow): Subject => ({
  ...row,
  enrolledAt: row.enrolledAt.toISOString(),
})
