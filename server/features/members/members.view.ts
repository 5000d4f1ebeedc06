import type { Member } from '#shared/schemas/member.ts'
import type { MemberRow } from './members.reads.ts'

/** A line of the team list as it goes out. */
export const toMember = (row: MemberRow): Member => ({
  ...row,
  personName: row.personName ?? 'Somebody no longer known',
  startsAt: row.startsAt.toISOString(),
  endsAt: row.endsAt?.toISOString() ?? null,
})
