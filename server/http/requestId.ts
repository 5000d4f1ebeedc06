import { randomUUID } from 'node:crypto'
import type { Request } from 'express'

/** Every request has a key of its own, which errors and audit events carry. */
export function requestId(request: Request): string {
  const carrier = request as Request & { breathmarkId?: string }
  carrier.breathmarkId ??= randomUUID()
  return carrier.breathmarkId
}
