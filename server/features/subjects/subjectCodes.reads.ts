import { randomInt } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { subjects } from '#db/schema/subjects.ts'
import { subjectCode } from '#shared/terms/subjectCode.ts'

/** Four digits while a site is small; one more whenever half of the numbers are taken. */
export function randomSubjectCode(prefix: string, taken: ReadonlySet<string>): string {
  let digits = 4
  while (taken.size > 10 ** digits / 2) digits += 1
  for (;;) {
    const number = String(randomInt(10 ** digits)).padStart(digits, '0')
    const code = subjectCode(prefix, number)
    if (code && !taken.has(code)) return code
  }
}

/** The codes that a site has given out. */
export async function takenCodes(
  read: Reader,
  studyId: string,
  siteId: string,
): Promise<Set<string>> {
  const rows = await read
    .select({ code: subjects.code })
    .from(subjects)
    .where(and(eq(subjects.studyId, studyId), eq(subjects.siteId, siteId)))
  return new Set(rows.map((row) => row.code))
}
