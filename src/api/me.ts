import { queryOptions } from '@tanstack/react-query'
import { me } from '#shared/schemas/me.ts'
import { request } from './http.ts'

/** Who is signed in; refused with 401 where nobody is. */
export const meQuery = queryOptions({
  queryKey: ['me'],
  queryFn: ({ signal }) => request(me, 'get', '/api/me', { signal }),
  staleTime: 60_000,
})
