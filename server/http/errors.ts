import type { ErrorRequestHandler, RequestHandler } from 'express'
import { AppError } from '#shared/errors/AppError.ts'
import { ERROR_CODES } from '#shared/errors/codes.ts'
import { requestId } from './requestId.ts'

/** The one place where errors become answers. A fault answers a request id and nothing else. */
export const answerError: ErrorRequestHandler = (error: unknown, request, response, next) => {
  if (response.headersSent) {
    next(error)
    return
  }
  const known = knownError(error)
  const id = requestId(request)
  if (known) {
    if (known.code === 'too-many' || known.code === 'busy') response.set('Retry-After', '10')
    response.status(known.status).json({
      code: known.code,
      message: known.message,
      ...(known.detail.fields ? { fields: known.detail.fields } : {}),
      ...(known.detail.more ? { more: known.detail.more } : {}),
      requestId: id,
    })
    return
  }
  // The log line carries the id and the fault, never the request's values.
  console.error(
    JSON.stringify({
      level: 'error',
      requestId: id,
      fault: String((error as Error)?.stack ?? error),
    }),
  )
  response.status(500).json({ code: 'internal', message: ERROR_CODES.internal[1], requestId: id })
}

function knownError(error: unknown): AppError | undefined {
  if (error instanceof AppError) return error
  // What body parsing throws carries a type of its own.
  const type = (error as { type?: string } | undefined)?.type
  if (type === 'entity.too.large') return new AppError('too-large')
  if (
    type === 'entity.parse.failed' ||
    type === 'request.aborted' ||
    type === 'request.size.invalid'
  )
    return new AppError('invalid', { message: 'The request is not valid JSON.' })
  if (type === 'encoding.unsupported' || type === 'charset.unsupported')
    return new AppError('unsupported-type')
  if (error instanceof URIError) return new AppError('not-found')
  // Express's own file server.
  const { status } = error as { status?: unknown }
  if (status === 404) return new AppError('no-such-route')
  if (status === 400 || status === 403) return new AppError('not-found')
  return undefined
}

export const noSuchRoute: RequestHandler = () => {
  throw new AppError('no-such-route')
}
