import { queryOptions } from '@tanstack/react-query'
import { type Me, me } from '#shared/schemas/me.ts'
import { ApiError } from './ApiError.ts'
import { request } from './http.ts'
import { noteOpener } from './opener.ts'

const meKey = ['me'] as const

/**
 * Who is signed in; refused with 401 where nobody is. Whoever opened the page stays its person: when
 * somebody else has signed in in this browser since, it is refused with `somebody-else`, so that no
 * part of the page changes hands, and what was typed stays.
 */
export const meQuery = queryOptions({
  queryKey: meKey,
  queryFn: async ({ signal, client }): Promise<Me> => {
    const now = await request(me, 'get', '/api/me', { signal })
    const opener = client.getQueryData<Me>(meKey)
    if (opener && opener.person.id !== now.person.id)
      throw new ApiError({
        status: 409,
        code: 'somebody-else',
        message: `${now.person.name} is signed in now.`,
        more: { name: now.person.name },
      })
    noteOpener(now.person.id)
    return now
  },
  staleTime: 60_000,
})

/** The name of who has signed in since somebody else opened this page. */
export function somebodyElseIn(error: unknown): string | null {
  return error instanceof ApiError && error.code === 'somebody-else'
    ? String(error.more?.name)
    : null
}
