import { reader } from '#db/client.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { getSite } from '#server/features/sites/sites.reads.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { SubjectCorrection, SubjectInput } from '#shared/schemas/subject.ts'
import { randomSubjectCode, takenCodes } from './subjectCodes.reads.ts'
import { getSubject, type SubjectRow } from './subjects.reads.ts'

/** Enrols a subject at a site under a new random code. */
export async function enrolSubject(
  actor: Actor,
  siteId: string,
  input: SubjectInput,
): Promise<SubjectRow> {
  await change({ actor, action: 'subject.enrol', of: { siteId } }, async (tx) => {
    const { studyId } = tx.allowed
    const site = await getSite(tx.read, siteId)
    await tx.insert(subjects, {
      ...input,
      studyId,
      siteId,
      code: randomSubjectCode(site.prefix, await takenCodes(tx.read, studyId, siteId)),
      enrolledAt: tx.at,
      createdAt: tx.at,
      covariates: {},
    })
  })
  return getSubject(reader(), input.id)
}

/** Corrects what was recorded of a subject; refused when somebody changed it meanwhile or nothing differs. */
export async function correctSubject(
  actor: Actor,
  subjectId: string,
  { version, reasonForChange: reason, ...values }: SubjectCorrection,
): Promise<SubjectRow> {
  await change({ actor, action: 'subject.correct', of: { subjectId }, reason }, async (tx) => {
    const differs = await tx.update(subjects, subjectId, values, version)
    if (!differs) throw new AppError('nothing-differs')
  })
  return getSubject(reader(), subjectId)
}
