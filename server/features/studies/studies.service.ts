import { newId } from '#db/id.ts'
import { analytes } from '#db/schema/analytes.ts'
import { members } from '#db/schema/members.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { sites } from '#db/schema/sites.ts'
import { studies } from '#db/schema/studies.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { Membership } from '#shared/policy/people.ts'
import type { StudyInput } from '#shared/schemas/study.ts'
import { identityOf } from '#shared/terms/gases.ts'
import { isCodeTaken } from './studies.reads.ts'

/** Who makes a study leads it. */
const FIRST_LINE = { role: 'coordinator', duty: 'studyLead', siteId: null } as const

/**
 * Makes a study of earlier data with its sites, analytes, first protocol version and first team
 * line in one go; its audit trail begins here.
 * @returns the creator's lines in it
 * @throws AppError already-exists at the code
 */
export async function createStudy(actor: Actor, input: StudyInput): Promise<Membership[]> {
  const { id: studyId, kind, code, title, document } = input
  await change({ actor, action: 'study.create', of: { newStudyId: studyId } }, async (tx) => {
    if (await isCodeTaken(tx.read, code))
      throw new AppError('already-exists', { fields: { code: 'Another study has this code.' } })
    const record = { studyId, createdAt: tx.at }
    await tx.insert(studies, {
      id: studyId,
      code,
      title,
      kind,
      demonstration: input.demonstration ?? false,
      createdAt: tx.at,
      createdBy: actor.personId,
    })
    for (const site of input.sites) await tx.insert(sites, { ...record, ...site, id: newId() })
    for (const analyte of input.analytes) {
      const { key, name, unit } = analyte
      await tx.insert(analytes, {
        ...record,
        id: newId(),
        key,
        name,
        unit,
        ...identityOf(analyte),
      })
    }
    await tx.insert(protocolVersions, {
      ...record,
      id: newId(),
      number: 1,
      document,
      documentHash: sha256Hex(canonicalJson(document)),
      createdBy: actor.personId,
    })
    await tx.insert(members, {
      ...record,
      ...FIRST_LINE,
      id: newId(),
      personId: actor.personId,
      startsAt: tx.at,
    })
  })
  return [FIRST_LINE]
}
