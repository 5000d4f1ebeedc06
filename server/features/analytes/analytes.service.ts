import { newId } from '#db/id.ts'
import { analytes } from '#db/schema/analytes.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { Analyte, AnalyteInput } from '#shared/schemas/protocol.ts'
import { identityOf } from '#shared/terms/gases.ts'
import { listAnalytes } from './analytes.reads.ts'

/** Adds an analyte to a study. @throws AppError already-exists at the name */
export function addAnalyte(actor: Actor, studyId: string, input: AnalyteInput): Promise<Analyte> {
  return change({ actor, action: 'analyte.add', of: { studyId } }, async (tx) => {
    const present = await listAnalytes(tx.read, studyId)
    if (present.some((each) => each.key === input.key))
      throw new AppError('already-exists', {
        fields: { name: 'The study measures this already.' },
      })
    const { key, name, unit } = input
    const row = { id: newId(), key, name, unit, ...identityOf(input) }
    await tx.insert(analytes, { ...row, studyId, createdAt: tx.at })
    return row
  })
}
