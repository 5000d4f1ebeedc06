import type { Reader } from '#db/client.ts'
import { currentProtocol } from '#server/features/protocol/protocol.reads.ts'
import type { Membership } from '#shared/policy/people.ts'
import type { Study, StudySummary } from '#shared/schemas/study.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { countStudy, getStudy, type listStudies } from './studies.reads.ts'

/** A study as its frame shows it to the holder of these lines. */
export async function studyFor(
  read: Reader,
  studyId: string,
  viewer: readonly Membership[],
): Promise<Study> {
  const row = await getStudy(read, studyId)
  const { number, document } = await currentProtocol(read, studyId)
  return {
    ...row,
    createdAt: row.createdAt.toISOString(),
    releasedAt: row.releasedAt?.toISOString() ?? null,
    lockedAt: row.lockedAt?.toISOString() ?? null,
    caution: CAUTIONS[document.regulatoryStatus],
    viewer: [...viewer],
    counts: {
      ...(await countStudy(read, studyId)),
      protocolVersion: number,
      plannedSubjects: document.plannedSubjects,
    },
  }
}

/** A line of the list of studies. */
export const toStudySummary = (
  row: Awaited<ReturnType<typeof listStudies>>[number],
): StudySummary => ({
  ...row,
  createdAt: row.createdAt.toISOString(),
  lockedAt: row.lockedAt?.toISOString() ?? null,
})
