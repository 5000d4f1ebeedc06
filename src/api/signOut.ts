import { z } from 'zod'
import { ApiError } from './ApiError.ts'
import { request } from './http.ts'

/** Ends the login here, then leaves for the identity provider's own sign-out. */
export async function signOut(): Promise<void> {
  try {
    const { redirectTo } = await request(
      z.object({ redirectTo: z.string() }),
      'post',
      '/auth/logout',
    )
    window.location.assign(redirectTo)
  } catch (error) {
    const alreadyOut = error instanceof ApiError && error.status === 401
    if (!alreadyOut) throw error
    window.location.assign('/')
  }
}
