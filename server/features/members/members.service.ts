import { reader } from '#db/client.ts'
import { members } from '#db/schema/members.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import type { Allowed } from '#server/changes/targets.ts'
import { listSites } from '#server/features/sites/sites.reads.ts'
import { holdStudy } from '#server/features/studies/studies.reads.ts'
import { AppError, refuseField } from '#shared/errors/AppError.ts'
import { conflictingDuty } from '#shared/policy/dutyConflicts.ts'
import type { MemberEnd, MemberInput } from '#shared/schemas/member.ts'
import { DUTY_LABELS, ROLE_LABELS } from '#shared/terms/team.ts'
import {
  getMember,
  holdPerson,
  listMembers,
  type MemberRow,
  type PersonRow,
} from './members.reads.ts'

/**
 * Adds a line to the team list.
 * @throws AppError own-membership; invalid at the field where the line would break a rule of the team
 */
export async function addMember(
  actor: Actor,
  studyId: string,
  input: MemberInput,
): Promise<MemberRow> {
  if (input.personId === actor.personId) throw new AppError('own-membership')
  await change({ actor, action: 'member.add', of: { studyId } }, async (tx) => {
    const person = await holdPerson(tx.read, input.personId)
    refuseStranger(person, input)
    const earlier = (await listMembers(tx.read, studyId)).filter(
      (line) => line.personId === input.personId,
    )
    refuseSecondRole(earlier, input)
    refuseDuty(earlier, input, tx.allowed)
    await refuseStrangeSite(tx.read, studyId, input)
    if (earlier.some((line) => line.endsAt === null && isSamePlace(line, input)))
      throw new AppError('already-exists', {
        fields: { personId: 'This person has this place in the team already.' },
      })
    await tx.insert(members, { ...input, studyId, createdAt: tx.at, startsAt: tx.at })
  })
  return getMember(reader(), input.id)
}

/** Ends a line of the team list from now on; the line stays. */
export async function endMember(
  actor: Actor,
  memberId: string,
  { reasonForChange: reason }: MemberEnd,
): Promise<MemberRow> {
  await change({ actor, action: 'member.end', of: { memberId }, reason }, async (tx) => {
    const { studyId } = tx.allowed
    // Two leads who end each other at once would leave the study without one.
    await holdStudy(tx.read, studyId)
    const lines = await listMembers(tx.read, studyId)
    if (!lines.some((line) => line.personId === actor.personId && line.endsAt === null))
      throw new AppError('not-allowed')
    const line = lines.find((each) => each.id === memberId)
    if (line?.personId === actor.personId) throw new AppError('own-membership')
    if (line?.endsAt)
      throw new AppError('not-in-this-state', { message: 'This place in the team has ended.' })
    await tx.update(members, memberId, { endsAt: tx.at, endReason: reason })
  })
  return getMember(reader(), memberId)
}

function refuseStranger(person: PersonRow | undefined, { role }: MemberInput): void {
  if (!person || person.disabled)
    refuseField('personId', 'Nobody of this key has signed in to this installation.')
  if (!person.roles.includes(role))
    refuseField(
      'role',
      `The identity provider does not name ${person.name} as ${article(ROLE_LABELS[role])}.`,
    )
}

function refuseSecondRole(earlier: readonly MemberRow[], { role }: MemberInput): void {
  const other = earlier.find((line) => line.role !== role)
  if (other)
    refuseField(
      'role',
      `${other.personName ?? 'This person'} is or was ${article(ROLE_LABELS[other.role])} in this study. One person has one role in a study, ever.`,
    )
}

/**
 * In an earlier-data study a line carries its role alone. In a prospective one every duty that the
 * person ever carried counts as having read its class, until release.
 */
function refuseDuty(earlier: readonly MemberRow[], line: MemberInput, allowed: Allowed): void {
  if (allowed.kind === 'earlierData') {
    if (line.duty) refuseField('duty', 'A study of earlier data has no duties beyond the role.')
    return
  }
  if (!line.duty) {
    if (line.role !== 'analyst') refuseField('duty', 'Please choose a duty.')
    return
  }
  const carried = earlier.flatMap(({ duty }) => (duty ? [duty] : []))
  const conflict = allowed.released ? null : conflictingDuty(line.duty, carried)
  if (conflict)
    refuseField(
      'duty',
      `"${DUTY_LABELS[line.duty]}" does not go together with "${DUTY_LABELS[conflict]}", which this person carries or carried.`,
    )
}

async function refuseStrangeSite(
  read: Parameters<typeof listSites>[0],
  studyId: string,
  { siteId }: MemberInput,
): Promise<void> {
  if (siteId === null) return
  const sites = await listSites(read, studyId)
  if (!sites.some((site) => site.id === siteId))
    refuseField('siteId', 'This study has no such site.')
}

const isSamePlace = (line: MemberRow, input: MemberInput) =>
  line.role === input.role && line.duty === input.duty && line.siteId === input.siteId

const article = (label: string) => `${/^[aeiou]/i.test(label) ? 'an' : 'a'} ${label.toLowerCase()}`
