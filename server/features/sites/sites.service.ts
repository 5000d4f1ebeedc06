import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { sites } from '#db/schema/sites.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { Site, SiteCorrection, SiteInput } from '#shared/schemas/site.ts'
import { getSite, listSites } from './sites.reads.ts'

/** Adds a site to a study. @throws AppError already-exists at name or prefix */
export async function addSite(actor: Actor, studyId: string, input: SiteInput): Promise<Site> {
  const siteId = await change({ actor, action: 'site.add', of: { studyId } }, async (tx) => {
    refuseTaken(await listSites(tx.read, studyId), input)
    const id = newId()
    await tx.insert(sites, { ...input, id, studyId, createdAt: tx.at })
    return id
  })
  return getSite(reader(), siteId)
}

/** Corrects a site's name or plan; its prefix stands in codes and stays. */
export async function correctSite(
  actor: Actor,
  siteId: string,
  { version, reasonForChange: reason, ...values }: SiteCorrection,
): Promise<Site> {
  await change({ actor, action: 'site.correct', of: { siteId }, reason }, async (tx) => {
    const others = await listSites(tx.read, tx.allowed.studyId)
    refuseTaken(
      others.filter((each) => each.id !== siteId),
      values,
    )
    const differs = await tx.update(sites, siteId, values, version)
    if (!differs) throw new AppError('nothing-differs')
  })
  return getSite(reader(), siteId)
}

function refuseTaken(present: readonly Site[], site: { name: string; prefix?: string }): void {
  const fields: Record<string, string> = {}
  const name = site.name.toLowerCase()
  if (present.some((each) => each.name.toLowerCase() === name))
    fields.name = 'Another site of this study has this name.'
  if (present.some((each) => each.prefix === site.prefix))
    fields.prefix = 'Another site of this study has this prefix.'
  if (Object.keys(fields).length > 0) throw new AppError('already-exists', { fields })
}
