import { json, type NextFunction, type Request, type Response, Router } from 'express'
import { sameSiteWrites } from '#server/http/guards.ts'
import { requestId } from '#server/http/requestId.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { startAttempt, takeAttempt } from './attempts.ts'
import { clearCookie, readCookie, setCookie } from './cookies.ts'
import { endLogin, recordLogin, signedIn, startLogin } from './logins.ts'
import { authorisationUrl, claimsFromCallback, signOutUrl } from './provider.ts'
import { grantSigning, SIGNING_PURPOSE } from './signing.ts'

/** Signing in, signing in again to sign, and signing out: the routes that exist without a login. */
export function authRoutes(): Router {
  const router = Router()
  router.get('/login', startSignIn)
  router.get('/sign', startSigning)
  router.get('/callback', finish)
  router.post('/logout', sameSiteWrites, json({ limit: '1kb' }), signOut)
  return router
}

async function startSignIn(request: Request, response: Response): Promise<void> {
  await goToProvider(response, await startAttempt(ownPath(request.query.returnTo)), false)
}

/** Somebody signed in authenticates again; what comes back is good for one signature. */
async function startSigning(request: Request, response: Response): Promise<void> {
  const person = await signedIn(request)
  const purpose = String(request.query.purpose ?? '')
  if (!SIGNING_PURPOSE.test(purpose)) throw new AppError('not-found')
  const attempt = await startAttempt(ownPath(request.query.returnTo), {
    personId: person.personId,
    purpose,
  })
  await goToProvider(response, attempt, true)
}

async function goToProvider(
  response: Response,
  attempt: Awaited<ReturnType<typeof startAttempt>>,
  freshly: boolean,
): Promise<void> {
  const url = await authorisationUrl(attempt.secrets, freshly)
  setCookie(response, 'breathmark-attempt', attempt.secret)
  response.redirect(url)
}

/** Every failure ends on our first page with a request id; what failed goes to the log and the trail. */
async function finish(request: Request, response: Response, next: NextFunction): Promise<void> {
  const attempt = await takeAttempt(readCookie(request, 'breathmark-attempt') ?? '')
  clearCookie(response, 'breathmark-attempt')
  try {
    if (!attempt) throw new Error('There is no sign-in under way in this browser.')
    const claims = await claimsFromCallback(request.originalUrl, attempt)
    if (attempt.signingPurpose) await grantSigning(request, attempt, claims)
    else setCookie(response, 'breathmark-login', await startLogin(request, claims))
    response.redirect(attempt.returnTo)
  } catch (error) {
    const { name, message, code } = error as Error & { code?: string }
    console.error(
      JSON.stringify({
        level: 'warn',
        requestId: requestId(request),
        event: 'login.refused',
        name,
        code,
        message,
      }),
    )
    await recordLogin(request, 'login.refused', { personId: null, name: 'nobody' }).catch(next)
    if (!response.headersSent) response.redirect(`/?signIn=refused&request=${requestId(request)}`)
  }
}

async function signOut(request: Request, response: Response): Promise<void> {
  const person = await signedIn(request)
  await endLogin(request, person)
  clearCookie(response, 'breathmark-login')
  response.json({ redirectTo: await signOutUrl(person.idToken) })
}

/** Only a path of ours, never another site, however it is written. */
function ownPath(wanted: unknown): string {
  if (typeof wanted !== 'string' || wanted.length > 500) return '/'
  if (!/^\/[A-Za-z0-9\-._~%!$&'()*+,;=:@/?]*$/.test(wanted) || wanted.startsWith('//')) return '/'
  return wanted
}
