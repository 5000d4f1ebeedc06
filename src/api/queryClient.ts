import { QueryClient } from '@tanstack/react-query'
import { ApiError } from './ApiError.ts'

declare module '@tanstack/react-query' {
  interface Register {
    mutationMeta: {
      /** Left out of the band's saved state: work that stores nothing of the person's. */
      quiet?: boolean
    }
  }
}

const MAX_RETRIES = 2

/** Asking again helps against a bad connection or a busy server, never against a refusal. */
function mayHelpToRetry(failures: number, error: Error): boolean {
  const answered = error instanceof ApiError && error.status > 0 && error.status < 500
  return !answered && failures < MAX_RETRIES
}

export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: mayHelpToRetry,
        // The browser's own idea of being offline is often wrong on a ward's network: try, and say so.
        networkMode: 'always',
      },
      mutations: { retry: false, networkMode: 'always' },
    },
  })
}
