import { eq, lt, sql } from 'drizzle-orm'
import type { RequestHandler } from 'express'
import { reader } from '#db/client.ts'
import { rateWindows } from '#db/schema/rateWindows.ts'
import { writePassing } from '#server/changes/passing.ts'
import { AppError } from '#shared/errors/AppError.ts'

const MINUTE_MS = 60_000
/** A process tells the shared table of its count after so many requests, not after each. */
const SHARE_EVERY = 20

type Window = { startsAt: number; own: number; unshared: number; all: number }

/**
 * Refuses more than `perMinute` requests of one caller, counted over all processes through the
 * database. A process counts in memory and shares in steps, so a flood overshoots by one step at most
 * for each process, and quiet callers cost no statement.
 */
export function limitRate(name: string, perMinute: number): RequestHandler {
  const windows = new Map<string, Window>()
  const step = Math.max(1, Math.min(SHARE_EVERY, Math.floor(perMinute / 4)))
  return async (request, _response, next) => {
    const startsAt = Math.floor(Date.now() / MINUTE_MS) * MINUTE_MS
    const caller = `${name}:${request.ip ?? 'unknown'}`.slice(0, 100)
    let window = windows.get(caller)
    if (!window || window.startsAt !== startsAt) {
      for (const [key, each] of windows) if (each.startsAt !== startsAt) windows.delete(key)
      window = { startsAt, own: 0, unshared: 0, all: 0 }
      windows.set(caller, window)
    }
    window.own += 1
    window.unshared += 1
    if (window.unshared >= step) {
      const add = window.unshared
      window.unshared = 0
      window.all = await share(caller, new Date(startsAt), add)
    }
    if (Math.max(window.own, window.all) > perMinute) throw new AppError('too-many')
    next()
  }
}

async function share(caller: string, windowAt: Date, add: number): Promise<number> {
  await writePassing(async (tx) => {
    await tx
      .insert(rateWindows)
      .values({ caller, windowAt, count: add })
      .onDuplicateKeyUpdate({ set: { count: sql`${rateWindows.count} + ${add}` } })
    await tx
      .delete(rateWindows)
      .where(lt(rateWindows.windowAt, new Date(windowAt.getTime() - MINUTE_MS)))
  })
  const rows = await reader()
    .select({ count: rateWindows.count })
    .from(rateWindows)
    .where(sql`${eq(rateWindows.caller, caller)} and ${eq(rateWindows.windowAt, windowAt)}`)
  return rows[0]?.count ?? add
}
