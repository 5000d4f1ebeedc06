/** Where the sign-in begins; the server sends the person back to the path. */
export function signInAddress(returnTo: string): string {
  return `/auth/login?returnTo=${encodeURIComponent(returnTo)}`
}

/** Where a sign-in in a second window ends, so that the first window keeps what was typed. */
export const SIGNED_IN_PATH = '/signed-in'
