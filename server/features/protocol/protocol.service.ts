import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { listAnalytes } from '#server/features/analytes/analytes.reads.ts'
import { holdStudy } from '#server/features/studies/studies.reads.ts'
import { AppError } from '#shared/errors/AppError.ts'
import {
  type ProtocolAmendment,
  type ProtocolDocument,
  strangeAnalytes,
} from '#shared/schemas/protocol.ts'
import { currentProtocol, type ProtocolRow } from './protocol.reads.ts'

/**
 * Puts a new version beside the old ones.
 * @throws AppError changed-meanwhile when the person did not see the newest version; invalid where
 * nothing differs or an analyte is not the study's
 */
export async function amendProtocol(
  actor: Actor,
  studyId: string,
  { document, basedOn, reasonForChange: reason }: ProtocolAmendment,
): Promise<ProtocolRow> {
  await change({ actor, action: 'protocol.amend', of: { studyId }, reason }, async (tx) => {
    // Two amendments at once would both take the next number.
    await holdStudy(tx.read, studyId)
    const current = await currentProtocol(tx.read, studyId)
    if (current.number !== basedOn)
      throw new AppError('changed-meanwhile', {
        message: `Version ${current.number} was made meanwhile. Look at it before you amend.`,
        more: { number: current.number },
      })
    if (canonicalJson(current.document) === canonicalJson(document))
      throw new AppError('invalid', { message: `Nothing differs from version ${basedOn}.` })
    const analytes = await listAnalytes(tx.read, studyId)
    refuseStrangeAnalytes(
      document,
      analytes.map((each) => each.key),
    )
    await tx.insert(protocolVersions, {
      id: newId(),
      studyId,
      createdAt: tx.at,
      number: basedOn + 1,
      document,
      documentHash: sha256Hex(canonicalJson(document)),
      createdBy: actor.personId,
    })
  })
  return currentProtocol(reader(), studyId)
}

function refuseStrangeAnalytes(document: ProtocolDocument, keys: readonly string[]): void {
  const strange = strangeAnalytes(document, keys)
  if (strange.length === 0) return
  throw new AppError('invalid', {
    fields: Object.fromEntries(
      strange.map(({ path, message }) => [['document', ...path].join('.'), message]),
    ),
  })
}
