import type { z } from 'zod'
import type { Actor } from '#server/changes/actor.ts'
import type { Allowed, Of } from '#server/changes/targets.ts'
import type { Action } from '#shared/policy/permissions.ts'

/** A file as the answer: always an attachment or inline PDF under a name of ours. */
export type FileAnswer = { bytes: Buffer; type: string; name: string; inline?: boolean }

type Input<P, Q, B> = {
  actor: Actor
  /** Study, site and reach of the record that the request is about. */
  allowed: Allowed
  params: P
  query: Q
  body: B
  /** The uploaded file, where the route takes one. */
  file: Express.Multer.File | undefined
}

type Shared<A extends Action> = {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  path: `/api/${string}`
  /** The row of the policy table that decides; no route without one. */
  action: A
  status?: number
  /** Takes one file in the field `file`, up to this many bytes. */
  uploadBytes?: number
}

export type Route = Shared<Action> & {
  params?: z.ZodType
  query?: z.ZodType
  body?: z.ZodType
  returns?: z.ZodType
  of?: (params: Record<string, string>) => Of
  handle: (input: Input<unknown, unknown, unknown>) => Promise<unknown>
}

/**
 * Declares a route. `of` names the record in the address that decides study, site and permission;
 * without it the action belongs to the installation. The answer passes through `returns`, so that
 * nothing leaves that the schema does not name.
 */
export function route<
  P extends z.ZodType = z.ZodType<Record<string, never>>,
  Q extends z.ZodType = z.ZodType<Record<string, never>>,
  B extends z.ZodType = z.ZodType<undefined>,
  R extends z.ZodType = z.ZodType,
>(
  definition: Shared<Action> & {
    params?: P
    query?: Q
    body?: B
    of?: (params: z.output<P>) => Of
  } & (
      | {
          returns: R
          handle: (input: Input<z.output<P>, z.output<Q>, z.output<B>>) => Promise<z.input<R>>
        }
      | {
          returns?: undefined
          handle: (input: Input<z.output<P>, z.output<Q>, z.output<B>>) => Promise<FileAnswer>
        }
    ),
): Route {
  return definition as unknown as Route
}
