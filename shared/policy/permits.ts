import type { Membership, Role, StudyKind } from './people.ts'
import { type Action, type Grant, policyRow } from './permissions.ts'

/** What the decision hangs on, apart from the person. */
export type Circumstances = {
  kind: StudyKind
  /** Site of the record; null when it belongs to the whole study. */
  siteId: string | null
  released: boolean
  /** Whether the person started the record (jobs). */
  own: boolean
}

/** Allowed with the sites whose rows are covered ('all' in a study-wide grant), or null: refused. */
export type Permit = { sites: 'all' | readonly string[] }

/**
 * Judges a person's lines of the team list against one action inside a study.
 *
 * In an earlier-data study a line counts by its role alone: it has no duties, and a line without a
 * site reaches the whole study.
 */
export function permits(
  action: Action,
  memberships: readonly Membership[],
  at: Circumstances,
): Permit | null {
  const row = policyRow(action)
  if (row.onlyKind && row.onlyKind !== at.kind) return null
  const released = at.released || at.kind === 'earlierData'
  const sites = new Set<string>()
  for (const grant of row.grants) {
    if (grant.afterRelease && !released) continue
    if (grant.scope === 'installation') return { sites: 'all' }
    for (const line of memberships) {
      const reach = reachOf(grant, line, at)
      if (reach === 'all') return { sites: 'all' }
      if (reach === null) continue
      if (at.siteId === reach) return { sites: [reach] }
      // A list of the whole study shows the rows of the person's own sites.
      if (at.siteId === null && row.effect === 'list') sites.add(reach)
      // Study-wide records (protocol, sites, team) are open to the people of each site.
      if (at.siteId === null && row.effect === 'read') sites.add(reach)
    }
  }
  return sites.size > 0 ? { sites: [...sites] } : null
}

/** 'all', the one site that the line reaches under this grant, or null. */
function reachOf(grant: Grant, line: Membership, at: Circumstances): 'all' | string | null {
  if (grant.role !== line.role) return null
  if (grant.scope === 'self') return at.own ? 'all' : null
  const dutyCounts = at.kind === 'prospective'
  if (dutyCounts && grant.duty !== line.duty) return null
  if (grant.scope === 'ownSite') return line.siteId ?? (dutyCounts ? null : 'all')
  return line.siteId === null ? 'all' : null
}

/** Actions outside any study hang on the role that the identity provider vouches for. */
export function permitsInstallation(action: Action, roles: readonly Role[]): boolean {
  return policyRow(action).grants.some(
    (grant) => grant.scope === 'installation' && roles.includes(grant.role),
  )
}
