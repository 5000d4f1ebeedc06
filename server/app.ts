import { join } from 'node:path'
import express, { type Express } from 'express'
import { authRoutes } from './auth/auth.routes.ts'
import { config } from './config.ts'
import { answerError, noSuchRoute } from './http/errors.ts'
import { noStore, sameSiteWrites, securityHeaders } from './http/guards.ts'
import { limitRate } from './http/rateLimit.ts'
import { serve } from './http/serve.ts'
import { ROUTES } from './routes.ts'

/** The whole API (and, where it is built, the client) as one Express application. */
export function createApp(): Express {
  const { BREATHMARK_TRUSTED_PROXIES, BREATHMARK_REQUESTS_PER_MINUTE, BREATHMARK_CLIENT_DIR } =
    config()
  const app = express()
  app.disable('x-powered-by')
  app.disable('etag')
  app.set('query parser', 'simple')
  app.set('trust proxy', BREATHMARK_TRUSTED_PROXIES)
  app.use(securityHeaders())

  app.use(
    '/auth',
    noStore,
    limitRate('auth', Math.ceil(BREATHMARK_REQUESTS_PER_MINUTE / 10)),
    authRoutes(),
  )
  app.use('/api', noStore, limitRate('api', BREATHMARK_REQUESTS_PER_MINUTE), sameSiteWrites)
  for (const route of ROUTES) serve(app, route)
  app.use('/api', noSuchRoute)

  if (BREATHMARK_CLIENT_DIR) serveClient(app, BREATHMARK_CLIENT_DIR)
  app.use(answerError)
  return app
}

/** Built files carry a hash in their names and may be kept for ever; the page itself may not. */
function serveClient(app: Express, folder: string): void {
  app.use(
    '/assets',
    express.static(join(folder, 'assets'), { immutable: true, maxAge: '1y', fallthrough: false }),
  )
  app.use(express.static(folder, { index: false, maxAge: 0 }))
  app.get('/{*path}', noStore, (_request, response) => {
    response.sendFile('index.html', { root: folder })
  })
}
