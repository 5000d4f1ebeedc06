import { type Express, json, type NextFunction, type Request, type Response } from 'express'
import type { z } from 'zod'
import { reader } from '#db/client.ts'
import { signedInActor } from '#server/auth/logins.ts'
import type { Actor } from '#server/changes/actor.ts'
import { recordRefusedAttempt } from '#server/changes/change.ts'
import { type Allowed, findAllowed, RefusedAttempt } from '#server/changes/targets.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { policyRow } from '#shared/policy/permissions.ts'
import { permitsInstallation } from '#shared/policy/permits.ts'
import type { FileAnswer, Route } from './route.ts'
import { receiveFile } from './upload.ts'

const parseJson = json({ limit: '1mb', strict: true })

/** Puts a route on the application: sign-in, permission, input, handling, output, in this order. */
export function serve(app: Express, route: Route): void {
  app[route.method](
    route.path,
    // Before the body: a stranger's upload is not read into memory.
    async (request: Request, response: Response, next: NextFunction) => {
      response.locals.admission = await admit(route, request)
      next()
    },
    route.uploadBytes ? receiveFile(route.uploadBytes) : parseJson,
    (request: Request, response: Response) => answer(route, request, response),
  )
}

type Admission = { actor: Actor; allowed: Allowed }

/** Who asks, and what they may reach. @throws AppError when they may not */
async function admit(route: Route, request: Request): Promise<Admission> {
  const actor = await signedInActor(request)
  refuseForSomebodyElse(request, actor)
  const allowed = await allowedFor(route, request, actor)
  refuseWhereLocked(route, allowed)
  return { actor, allowed }
}

async function answer(route: Route, request: Request, response: Response): Promise<void> {
  const { actor, allowed } = response.locals.admission as Admission
  const result = await route.handle({
    actor,
    allowed,
    params: checked(route.params, request.params, 'params'),
    query: checked(route.query, request.query, 'query'),
    body: checked(route.body, request.body, 'body'),
    file: request.file,
  })
  if (route.returns) response.status(route.status ?? 200).json(route.returns.parse(result))
  else sendFile(response, result as FileAnswer)
}

/** A page that one person opened never writes under the name of another who signed in since. */
function refuseForSomebodyElse(request: Request, actor: Actor): void {
  const opener = request.get('x-breathmark-person')
  if (opener !== undefined && opener !== actor.personId) throw new AppError('somebody-else')
}

/** Permission first: whoever may not do this learns nothing from what is wrong with the input. */
async function allowedFor(route: Route, request: Request, actor: Actor): Promise<Allowed> {
  if (!route.of) {
    if (!permitsInstallation(route.action, actor.roles)) throw new AppError('not-allowed')
    return undefined as never
  }
  // A malformed key is a key of nothing.
  const params = route.params?.safeParse(request.params)
  if (params && !params.success) throw new AppError('not-found')
  try {
    return await findAllowed(
      reader(),
      actor,
      route.action,
      route.of((params?.data ?? request.params) as Record<string, string>),
    )
  } catch (error) {
    if (error instanceof RefusedAttempt)
      await recordRefusedAttempt(actor, error.studyId, error.action)
    throw error
  }
}

/** Says `locked` before anything else is found wrong; change() asks again where it counts. */
function refuseWhereLocked(route: Route, allowed: Allowed | undefined): void {
  const { effect, whenLocked } = policyRow(route.action)
  if (effect === 'write' && whenLocked !== 'allow' && allowed?.lockedAt)
    throw new AppError('locked')
}

function checked(schema: z.ZodType | undefined, value: unknown, where: string): unknown {
  if (!schema) return undefined
  const result = schema.safeParse(value)
  if (result.success) return result.data
  if (where === 'params') throw new AppError('not-found')
  const fields: Record<string, string> = {}
  for (const issue of result.error.issues) {
    const path = issue.path.join('.') || 'form'
    fields[path] ??= issue.message
  }
  throw new AppError('invalid', { fields })
}

function sendFile(response: Response, file: FileAnswer): void {
  const disposition = file.inline ? 'inline' : 'attachment'
  response
    .status(200)
    .set('Content-Type', file.type)
    .set('Content-Disposition', `${disposition}; filename="${file.name}"`)
    .send(file.bytes)
}
