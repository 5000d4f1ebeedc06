import { and, eq, gt, isNotNull, isNull, or } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { members } from '#db/schema/members.ts'
import { people } from '#db/schema/people.ts'
import { config } from '#server/config.ts'
import type { StudyRow } from '#server/features/studies/studies.reads.ts'
import type { Letter } from '#server/mail/outbox.ts'
import type { Membership } from '#shared/policy/people.ts'
import { permits } from '#shared/policy/permits.ts'

type Pages = { open: number; closed: number }

/**
 * Letters to everybody in the team who may read a part: where it lies and how many pages it has. No
 * title, since people write results into titles, and nothing of the data.
 */
export async function reportLetters(
  read: Reader,
  study: StudyRow,
  report: { number: number; pages: Pages },
): Promise<Letter[]> {
  const at = {
    kind: study.kind,
    siteId: null,
    released: study.kind === 'earlierData' || study.releasedAt !== null,
    own: false,
  }
  const letters: Letter[] = []
  for (const [recipient, lines] of await teamByAddress(read, study.id)) {
    if (!permits('report.readOpen', lines, at)) continue
    const closed = permits('report.readClosed', lines, at) !== null
    letters.push({
      recipient,
      subject: `${study.code}: report ${report.number} can be read`,
      text: letterText(study, report.number, {
        open: report.pages.open,
        ...(closed ? { closed: report.pages.closed } : {}),
      }),
    })
  }
  return letters
}

/** The active lines of the team list by address; who has left or has no address gets nothing. */
async function teamByAddress(read: Reader, studyId: string): Promise<Map<string, Membership[]>> {
  const now = new Date()
  const rows = await read
    .select({ email: people.email, role: members.role, duty: members.duty, siteId: members.siteId })
    .from(members)
    .innerJoin(people, eq(people.id, members.personId))
    .where(
      and(
        eq(members.studyId, studyId),
        or(isNull(members.endsAt), gt(members.endsAt, now)),
        eq(people.disabled, false),
        isNotNull(people.email),
      ),
    )
    .orderBy(people.email)
  const team = new Map<string, Membership[]>()
  for (const { email, ...line } of rows) team.set(email!, [...(team.get(email!) ?? []), line])
  return team
}

function letterText(study: StudyRow, number: number, pages: Partial<Pages>): string {
  const page = (count: number) => `${count} ${count === 1 ? 'page' : 'pages'}`
  return [
    `Report ${number} of study ${study.code} has been issued.`,
    '',
    `Open part: ${page(pages.open ?? 0)}`,
    ...(pages.closed === undefined ? [] : [`Closed part: ${page(pages.closed)}`]),
    '',
    'Sign in to read it:',
    `${config().BREATHMARK_PUBLIC_URL.replace(/\/$/, '')}/studies/${study.id}/reports`,
    '',
    'This letter carries no data. It went to you because you are in the team of this study.',
  ].join('\n')
}
