import { and, eq, gt, isNull, or, sql } from 'drizzle-orm'
import { alias, type MySqlColumn, type MySqlTable } from 'drizzle-orm/mysql-core'
import type { Reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { datasets } from '#db/schema/datasets.ts'
import { imports } from '#db/schema/imports.ts'
import { jobs } from '#db/schema/jobs.ts'
import { locks } from '#db/schema/locks.ts'
import { members } from '#db/schema/members.ts'
import { reports } from '#db/schema/reports.ts'
import { sites } from '#db/schema/sites.ts'
import { studies } from '#db/schema/studies.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { subjects } from '#db/schema/subjects.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { Membership, StudyKind } from '#shared/policy/people.ts'
import { type Action, policyRow } from '#shared/policy/permissions.ts'
import { type Permit, permits } from '#shared/policy/permits.ts'
import type { Actor } from './actor.ts'

type TargetTable = {
  table: MySqlTable
  id: MySqlColumn
  studyId: MySqlColumn
  siteId?: MySqlColumn
  startedBy?: MySqlColumn
}

/** Where each kind of record says which study, and which site, it belongs to. */
const TARGETS = {
  studyId: { table: studies, id: studies.id, studyId: studies.id },
  siteId: { table: sites, id: sites.id, studyId: sites.studyId, siteId: sites.id },
  subjectId: {
    table: subjects,
    id: subjects.id,
    studyId: subjects.studyId,
    siteId: subjects.siteId,
  },
  memberId: { table: members, id: members.id, studyId: members.studyId },
  importId: { table: imports, id: imports.id, studyId: imports.studyId },
  lockId: { table: locks, id: locks.id, studyId: locks.studyId },
  datasetId: { table: datasets, id: datasets.id, studyId: datasets.studyId },
  analysisId: { table: analyses, id: analyses.id, studyId: analyses.studyId },
  reportId: { table: reports, id: reports.id, studyId: reports.studyId },
  jobId: { table: jobs, id: jobs.id, studyId: jobs.studyId, startedBy: jobs.startedBy },
} as const satisfies Record<string, TargetTable>

export type TargetKey = keyof typeof TARGETS
export const TARGET_KEYS = Object.keys(TARGETS) as TargetKey[]

/** The one record that a request is about, such as `{ subjectId }`. */
export type Of = { [K in TargetKey]?: string }

/** A record found and allowed: where it lies, and which sites' rows the person may see. */
export type Allowed = {
  studyId: string
  siteId: string | null
  kind: StudyKind
  released: boolean
  lockedAt: Date | null
  memberships: Membership[]
  sites: Permit['sites']
  /** The line of the team list that the audit trail names. */
  line: Membership
}

const study = alias(studies, 'study_of_record')
const line = alias(members, 'line_of_person')

/**
 * Finds the record together with the person's active lines of its study that reach its site, in one
 * query: what does not exist and what belongs to others both come back empty, so both are 404.
 */
export async function findAllowed(
  read: Reader,
  actor: Actor,
  action: Action,
  of: Of,
): Promise<Allowed> {
  const [key, id] = Object.entries(of)[0] as [TargetKey, string]
  const target: TargetTable = TARGETS[key]
  const siteId = target.siteId ?? sql`null`
  const now = new Date()
  const lines = await read
    .select({
      studyId: sql<string>`${target.studyId}`,
      recordSiteId: sql<string | null>`${siteId}`,
      startedBy: sql<string | null>`${target.startedBy ?? sql`null`}`,
      kind: study.kind,
      releasedAt: study.releasedAt,
      lockedAt: studyGuards.lockedAt,
      role: line.role,
      duty: line.duty,
      siteId: line.siteId,
    })
    .from(target.table)
    .innerJoin(study, eq(study.id, target.studyId))
    .innerJoin(studyGuards, eq(studyGuards.studyId, target.studyId))
    .innerJoin(line, eq(line.studyId, target.studyId))
    .where(
      and(
        eq(target.id, id),
        eq(line.personId, actor.personId),
        or(isNull(line.endsAt), gt(line.endsAt, now)),
        sql`(${siteId} is null or ${line.siteId} is null or ${line.siteId} = ${siteId})`,
      ),
    )
  // A role that the identity provider no longer vouches for opens nothing, whatever the list says.
  const vouched = lines.filter(({ role }) => actor.roles.includes(role))
  const found = vouched[0]
  if (!found) throw new AppError('not-found')

  const memberships: Membership[] = vouched.map(({ role, duty, siteId }) => ({
    role,
    duty,
    siteId,
  }))
  const released = found.kind === 'earlierData' || found.releasedAt !== null
  const circumstances = {
    kind: found.kind,
    siteId: found.recordSiteId,
    released,
    own: found.startedBy === actor.personId,
  }
  const { onlyKind } = policyRow(action)
  if (onlyKind && onlyKind !== found.kind) throw new AppError('wrong-kind-of-study')
  const permit = permits(action, memberships, circumstances)
  if (!permit) {
    // Another person's job is nobody's business: as if it did not exist.
    if (target.startedBy && !circumstances.own) throw new AppError('not-found')
    throw new RefusedAttempt(found.studyId, action)
  }
  return {
    studyId: found.studyId,
    siteId: found.recordSiteId,
    kind: found.kind,
    released,
    lockedAt: found.lockedAt,
    memberships,
    sites: permit.sites,
    line: memberships.find((each) => permits(action, [each], circumstances)) ?? memberships[0]!,
  }
}

/** A refusal inside a study that the person belongs to; it goes to the study's audit trail. */
export class RefusedAttempt extends AppError {
  readonly studyId: string
  readonly action: Action

  constructor(studyId: string, action: Action) {
    super('not-allowed')
    this.studyId = studyId
    this.action = action
  }
}
