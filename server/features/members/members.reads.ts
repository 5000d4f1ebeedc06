import { asc, eq } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { members } from '#db/schema/members.ts'
import { people } from '#db/schema/people.ts'
import { sites } from '#db/schema/sites.ts'
import { AppError } from '#shared/errors/AppError.ts'

const columns = {
  id: members.id,
  studyId: members.studyId,
  personId: members.personId,
  personName: people.name,
  role: members.role,
  duty: members.duty,
  siteId: members.siteId,
  siteName: sites.name,
  startsAt: members.startsAt,
  endsAt: members.endsAt,
  endReason: members.endReason,
}
export type MemberRow = Awaited<ReturnType<typeof listMembers>>[number]
export type PersonRow = typeof people.$inferSelect

/** Every line that the team list ever had, by name and then by time. */
export const listMembers = (read: Reader, studyId: string) =>
  read
    .select(columns)
    .from(members)
    .leftJoin(people, eq(people.id, members.personId))
    .leftJoin(sites, eq(sites.id, members.siteId))
    .where(eq(members.studyId, studyId))
    .orderBy(asc(people.name), asc(members.startsAt))

/** One line. @throws AppError not-found */
export async function getMember(read: Reader, memberId: string): Promise<MemberRow> {
  const [row] = await read
    .select(columns)
    .from(members)
    .leftJoin(people, eq(people.id, members.personId))
    .leftJoin(sites, eq(sites.id, members.siteId))
    .where(eq(members.id, memberId))
  if (!row) throw new AppError('not-found')
  return row
}

/** Whom the identity provider has vouched for here, by name; nobody who was shut out. */
export const listPeople = (read: Reader) =>
  read
    .select({ id: people.id, name: people.name, roles: people.roles })
    .from(people)
    .where(eq(people.disabled, false))
    .orderBy(asc(people.name))

/** Takes a person's row, so that two additions of one person are judged one after the other. */
export async function holdPerson(read: Reader, personId: string): Promise<PersonRow | undefined> {
  const [row] = await read.select().from(people).where(eq(people.id, personId)).for('update')
  return row
}
