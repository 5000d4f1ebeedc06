import { and, asc, count, eq, gt, inArray, isNull, ne, or } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { auditChains } from '#db/schema/auditChains.ts'
import { locks } from '#db/schema/locks.ts'
import { members } from '#db/schema/members.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { reports } from '#db/schema/reports.ts'
import { sessions } from '#db/schema/sessions.ts'
import { studies } from '#db/schema/studies.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { subjects } from '#db/schema/subjects.ts'
import { AppError } from '#shared/errors/AppError.ts'

const columns = {
  id: studies.id,
  code: studies.code,
  title: studies.title,
  kind: studies.kind,
  demonstration: studies.demonstration,
  createdAt: studies.createdAt,
  releasedAt: studies.releasedAt,
  lockedAt: studyGuards.lockedAt,
}
export type StudyRow = Awaited<ReturnType<typeof getStudy>>

/** One study. @throws AppError not-found */
export async function getStudy(read: Reader, studyId: string) {
  const [row] = await read
    .select(columns)
    .from(studies)
    .innerJoin(studyGuards, eq(studyGuards.studyId, studies.id))
    .where(eq(studies.id, studyId))
  if (!row) throw new AppError('not-found')
  return row
}

/** Takes the study's own row, so that one writer at a time decides on what is numbered or unique in it. */
export async function holdStudy(read: Reader, studyId: string): Promise<void> {
  await read.select({ id: studies.id }).from(studies).where(eq(studies.id, studyId)).for('update')
}

/** Whether any study of the installation has this code. */
export async function isCodeTaken(read: Reader, code: string): Promise<boolean> {
  return (await read.$count(studies, eq(studies.code, code))) > 0
}

/** The studies in which a person has a place now, with the roles there and the number of subjects. */
export async function listStudies(read: Reader, personId: string) {
  const lines = await read
    .select({ ...columns, role: members.role })
    .from(members)
    .innerJoin(studies, eq(studies.id, members.studyId))
    .innerJoin(studyGuards, eq(studyGuards.studyId, studies.id))
    .where(
      and(
        eq(members.personId, personId),
        or(isNull(members.endsAt), gt(members.endsAt, new Date())),
      ),
    )
    .orderBy(asc(studies.code))
  const ids = [...new Set(lines.map((line) => line.id))]
  if (ids.length === 0) return []
  const counted = await read
    .select({ studyId: subjects.studyId, subjects: count() })
    .from(subjects)
    .where(inArray(subjects.studyId, ids))
    .groupBy(subjects.studyId)
  return ids.map((id) => {
    const own = lines.filter((line) => line.id === id)
    const { role: _role, ...row } = own[0]!
    return {
      ...row,
      roles: [...new Set(own.map((line) => line.role))],
      subjectCount: counted.find((each) => each.studyId === id)?.subjects ?? 0,
    }
  })
}

/**
 * How far a study is. All of it is class `none`: none of these counts tells a value, an outcome or
 * how many have the condition.
 */
export async function countStudy(read: Reader, studyId: string) {
  const [chain] = await read
    .select({ count: auditChains.count })
    .from(auditChains)
    .where(eq(auditChains.id, studyId))
  const lockRows = await read
    .select({ state: locks.state })
    .from(locks)
    .where(eq(locks.studyId, studyId))
  return {
    subjects: await read.$count(subjects, eq(subjects.studyId, studyId)),
    sessions: await read.$count(sessions, eq(sessions.studyId, studyId)),
    decidedOutcomes: await read.$count(
      referenceOutcomes,
      and(eq(referenceOutcomes.studyId, studyId), ne(referenceOutcomes.outcome, 'notDone')),
    ),
    auditEvents: chain?.count ?? 0,
    locks: lockRows.filter((lock) => lock.state === 'approved').length,
    openLockRequest: lockRows.some((lock) => lock.state === 'requested'),
    analyses: await read.$count(analyses, eq(analyses.studyId, studyId)),
    reports: await read.$count(
      reports,
      and(eq(reports.studyId, studyId), eq(reports.state, 'issued')),
    ),
  }
}
