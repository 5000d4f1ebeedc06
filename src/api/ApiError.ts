import { z } from 'zod'

const errorBody = z.object({
  code: z.string(),
  message: z.string(),
  fields: z.record(z.string(), z.string()).optional(),
  requestId: z.string().optional(),
  more: z.record(z.string(), z.unknown()).optional(),
})

type Refusal = {
  status: number
  code: string
  message: string
  fields?: Record<string, string>
  requestId?: string
  more?: Record<string, unknown>
}

/** An answer that was not what was asked for. `status` 0: the server was not reached. */
export class ApiError extends Error {
  readonly status: number
  readonly code: string
  /** Path of a field in the body, and the sentence to show beside it. */
  readonly fields?: Record<string, string>
  readonly requestId?: string
  readonly more?: Record<string, unknown>

  constructor(refusal: Refusal) {
    super(refusal.message)
    this.name = 'ApiError'
    this.status = refusal.status
    this.code = refusal.code
    this.fields = refusal.fields
    this.requestId = refusal.requestId
    this.more = refusal.more
  }
}

export function unreachable(): ApiError {
  return new ApiError({
    status: 0,
    code: 'unreachable',
    message: 'The server cannot be reached. Check the connection and try again.',
  })
}

/** Reads the server's error body; a proxy's own page becomes a plain sentence. */
export function refusalFrom(status: number, body: unknown): ApiError {
  const parsed = errorBody.safeParse(body)
  if (parsed.success) return new ApiError({ status, ...parsed.data })
  return new ApiError({
    status,
    code: 'unexpected-answer',
    message: `The server gave an answer that Breathmark does not understand (status ${status}).`,
  })
}
