import type { MySqlTable } from 'drizzle-orm/mysql-core'
import type { Database } from '#db/client.ts'
import { importChunks } from '#db/schema/importChunks.ts'
import { importRows } from '#db/schema/importRows.ts'
import { jobs } from '#db/schema/jobs.ts'
import { loginAttempts } from '#db/schema/loginAttempts.ts'
import { logins } from '#db/schema/logins.ts'
import { mails } from '#db/schema/mails.ts'
import { people } from '#db/schema/people.ts'
import { rateWindows } from '#db/schema/rateWindows.ts'
import { signingGrants } from '#db/schema/signingGrants.ts'
import { writer } from '#db/writer.ts'
import { appendEvents, type Circumstance, type Happening } from './auditTrail.ts'
import { retried } from './retry.ts'

/** Tables that hold no study data: sign-ins, counters, the queue, the outbox, files on their way in. */
export type PassingTable =
  | typeof importChunks
  | typeof importRows
  | typeof jobs
  | typeof loginAttempts
  | typeof logins
  | typeof mails
  | typeof people
  | typeof rateWindows
  | typeof signingGrants

export const PASSING_TABLES: readonly MySqlTable[] = [
  importChunks,
  importRows,
  jobs,
  loginAttempts,
  logins,
  mails,
  people,
  rateWindows,
  signingGrants,
]

/**
 * The named place for writers with no study: server/auth, server/jobs and server/mail. The caller
 * keeps to passing tables; the architecture test keeps the list of callers.
 */
export function writePassing<T>(
  write: (tx: Pick<Database, 'select' | 'insert' | 'update' | 'delete' | 'execute'>) => Promise<T>,
): Promise<T> {
  return retried(() =>
    writer().transaction((database) => write(database), { isolationLevel: 'read committed' }),
  )
}

/** Appends to the installation's own chain: sign-ins and what else belongs to no study. */
export function recordInstallationEvent(
  happening: Happening,
  circumstance: Circumstance,
): Promise<void> {
  return retried(() =>
    writer().transaction((database) =>
      appendEvents(database, 'installation', [happening], circumstance),
    ),
  )
}
