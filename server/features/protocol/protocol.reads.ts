import { and, desc, eq } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { auditEvents } from '#db/schema/auditEvents.ts'
import { people } from '#db/schema/people.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { AppError } from '#shared/errors/AppError.ts'

export type ProtocolRow = Awaited<ReturnType<typeof listProtocolVersions>>[number]

/** The protocol as it holds now. @throws AppError not-found */
export async function currentProtocol(read: Reader, studyId: string): Promise<ProtocolRow> {
  const [row] = await versionsOf(read, studyId).limit(1)
  if (!row) throw new AppError('not-found')
  return row
}

/** All versions, the newest first. */
export const listProtocolVersions = (read: Reader, studyId: string) => versionsOf(read, studyId)

const versionsOf = (read: Reader, studyId: string) =>
  read
    .select({
      id: protocolVersions.id,
      number: protocolVersions.number,
      document: protocolVersions.document,
      documentHash: protocolVersions.documentHash,
      createdAt: protocolVersions.createdAt,
      createdByName: people.name,
      reason: auditEvents.reason,
    })
    .from(protocolVersions)
    .leftJoin(people, eq(people.id, protocolVersions.createdBy))
    // The trail is where a reason is kept.
    .leftJoin(
      auditEvents,
      and(
        eq(auditEvents.chainId, protocolVersions.studyId),
        eq(auditEvents.recordType, 'protocol'),
        eq(auditEvents.recordId, protocolVersions.id),
      ),
    )
    .where(eq(protocolVersions.studyId, studyId))
    .orderBy(desc(protocolVersions.number))
