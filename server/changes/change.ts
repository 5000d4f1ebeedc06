import { sql } from 'drizzle-orm'
import type { Database } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { auditChains } from '#db/schema/auditChains.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { writer } from '#db/writer.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { type Action, policyRow } from '#shared/policy/permissions.ts'
import { permitsInstallation } from '#shared/policy/permits.ts'
import type { Actor } from './actor.ts'
import { appendEvents } from './auditTrail.ts'
import { ChangeTx } from './ChangeTx.ts'
import { retried } from './retry.ts'
import { type Allowed, findAllowed, type Of } from './targets.ts'

export type Change = {
  actor: Actor
  action: Action
  /** The record that decides study, site and permission; a study that is being made names its new key. */
  of: Of | { newStudyId: string }
  /** Why; needed as soon as a saved record changes. */
  reason?: string | undefined
}

const NO_HASH_YET = '0'.repeat(64)

/**
 * The only way to write study data. In one transaction: finds study and site of the record, asks the
 * policy table, takes the study's guard row (shared; the lock takes it alone) and refuses where the
 * data are locked, lets `write` read and write, and last of all appends the audit events. Broken-off
 * transactions run again, so `write` must have no effects but those on `tx`.
 *
 * @throws AppError not-found, not-allowed, wrong-kind-of-study, locked, reason-required, busy
 */
export async function change<T>(request: Change, write: (tx: ChangeTx) => Promise<T>): Promise<T> {
  return retried(() =>
    writer().transaction(
      async (database) => {
        const allowed = await admit(database, request)
        const tx = new ChangeTx(database, request, allowed)
        const result = await write(tx)
        await appendEvents(database, allowed.studyId, tx.happenings, {
          actor: request.actor,
          line: allowed.line,
          reason: request.reason ?? null,
          at: tx.at,
        })
        return result
      },
      // Each read sees what is committed: the guard, not a snapshot, keeps the data still.
      { isolationLevel: 'read committed' },
    ),
  )
}

async function admit(database: Database, { actor, action, of }: Change): Promise<Allowed> {
  if ('newStudyId' in of) return foundStudy(database, actor, action, of.newStudyId)
  const allowed = await findAllowed(database, actor, action, of)
  const { whenLocked, guard } = policyRow(action)
  const mode = guard === 'exclusive' ? sql`for update` : sql`lock in share mode`
  const [rows] = (await database.execute(
    sql`select ${studyGuards.lockedAt} as lockedAt from ${studyGuards} where ${studyGuards.studyId} = ${allowed.studyId} ${mode}`,
  )) as unknown as [{ lockedAt: Date | null }[]]
  if (!rows[0]) throw new Error(`Study ${allowed.studyId} has no guard row.`)
  if (rows[0].lockedAt !== null && whenLocked !== 'allow') throw new AppError('locked')
  return allowed
}

/** A new study brings its guard and its chain with it, so that its trail begins with its making. */
async function foundStudy(
  database: Database,
  actor: Actor,
  action: Action,
  studyId: string,
): Promise<Allowed> {
  if (!permitsInstallation(action, actor.roles)) throw new AppError('not-allowed')
  await database.insert(studyGuards).values({ studyId, lockedAt: null })
  await database.insert(auditChains).values({ id: studyId, count: 0, headHash: NO_HASH_YET })
  const line = { role: 'coordinator', duty: 'studyLead', siteId: null } as const
  return {
    studyId,
    siteId: null,
    kind: 'prospective',
    released: false,
    lockedAt: null,
    memberships: [line],
    sites: 'all',
    line,
  }
}

/** Puts a refused attempt into the trail of the study in which it was made. */
export async function recordRefusedAttempt(
  actor: Actor,
  studyId: string,
  action: Action,
): Promise<void> {
  await retried(() =>
    writer().transaction((database) =>
      appendEvents(
        database,
        studyId,
        [
          {
            event: 'attempt.refused',
            recordType: 'action',
            recordId: newId(),
            recordLabel: action,
            fields: [],
          },
        ],
        { actor, line: null, reason: null, at: new Date() },
      ),
    ),
  )
}
