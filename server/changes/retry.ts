import { setTimeout as wait } from 'node:timers/promises'
import { AppError } from '#shared/errors/AppError.ts'

const DEADLOCK = 1213
const LOCK_WAIT = 1205
const DUPLICATE = 1062
const SIGNALLED = 1644
const MOST_TRIES = 12

/** The database's own error number, however deep the driver wrapped it. */
export function databaseErrno(error: unknown): number | undefined {
  for (
    let each = error as { errno?: unknown; cause?: unknown } | undefined;
    each;
    each = each.cause as never
  )
    if (typeof each.errno === 'number') return each.errno
  return undefined
}

function databaseMessage(error: unknown): string {
  let message = ''
  for (
    let each = error as { message?: string; cause?: unknown } | undefined;
    each;
    each = each.cause as never
  )
    message = each.message ?? message
  return message
}

/**
 * Runs a transaction again when the database broke it off for the sake of another (a deadlock, a
 * lock waited for too long, or a conflict between cluster nodes, which arrives as a deadlock), a
 * bounded number of times; then says `busy`. What the database refuses on principle comes out as
 * the code that the service would have given.
 */
export async function retried<T>(transaction: () => Promise<T>): Promise<T> {
  for (let tries = 1; ; tries++) {
    try {
      return await transaction()
    } catch (error) {
      const errno = databaseErrno(error)
      if (errno === DUPLICATE) throw new AppError('already-exists')
      if (errno === SIGNALLED && databaseMessage(error).includes('locked:'))
        throw new AppError('locked')
      if (errno !== DEADLOCK && errno !== LOCK_WAIT) throw error
      if (tries === MOST_TRIES) throw new AppError('busy')
      // Spread the retries, so that the same transactions do not meet again at once.
      await wait(Math.random() * 10 * tries)
    }
  }
}
