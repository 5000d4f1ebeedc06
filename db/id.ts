import { randomUUID } from 'node:crypto'

/** A new key. */
export const newId = (): string => randomUUID()
