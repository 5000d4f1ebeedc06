import type { CookieOptions, Request, Response } from 'express'
import { config } from '#server/config.ts'

/** The two cookies of the product; cookies ignore ports, so their names are the product's own. */
export type CookieName = 'breathmark-login' | 'breathmark-attempt'

const secure = () => config().BREATHMARK_PUBLIC_URL.startsWith('https://')
const fullName = (name: CookieName) => (secure() ? `__Host-${name}` : name)
const options = (): CookieOptions => ({
  httpOnly: true,
  secure: secure(),
  // Lax, since the identity provider's redirect back to us is a navigation from another site.
  sameSite: 'lax',
  path: '/',
})

export function setCookie(response: Response, name: CookieName, value: string): void {
  response.cookie(fullName(name), value, options())
}

export function clearCookie(response: Response, name: CookieName): void {
  response.clearCookie(fullName(name), options())
}

export function readCookie(request: Request, name: CookieName): string | undefined {
  const prefix = `${fullName(name)}=`
  return request
    .get('cookie')
    ?.split(/;\s*/)
    .find((each) => each.startsWith(prefix))
    ?.slice(prefix.length)
}
