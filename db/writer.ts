import { current, type Database } from './client.ts'

/** The writable database. Only server/changes may import this. */
export const writer = (): Database => current()
