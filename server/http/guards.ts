import type { RequestHandler } from 'express'
import helmet from 'helmet'
import { config } from '#server/config.ts'
import { AppError } from '#shared/errors/AppError.ts'

const READING = new Set(['GET', 'HEAD', 'OPTIONS'])

/** Strict headers; nothing that the API says is kept by a browser or a proxy. */
export function securityHeaders(): RequestHandler {
  const secure = config().BREATHMARK_PUBLIC_URL.startsWith('https://')
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'none'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'"],
        // React sets widths and positions as style attributes.
        styleSrcAttr: ["'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        manifestSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        // Signing out goes on to the identity provider.
        formAction: ["'self'", new URL(config().BREATHMARK_OIDC_ISSUER).origin],
        frameAncestors: ["'none'"],
      },
    },
    strictTransportSecurity: secure ? { maxAge: 63_072_000, includeSubDomains: true } : false,
    referrerPolicy: { policy: 'same-origin' },
    crossOriginOpenerPolicy: { policy: 'same-origin' },
  })
}

export const noStore: RequestHandler = (_request, response, next) => {
  response.set('Cache-Control', 'no-store')
  next()
}

/**
 * Writes must come from our own pages: the browser's own word on the origin, and a header that no
 * form on another site can send.
 */
export const sameSiteWrites: RequestHandler = (request, _response, next) => {
  if (READING.has(request.method)) {
    next()
    return
  }
  const origin = request.get('origin')
  const site = request.get('sec-fetch-site')
  const foreign =
    (origin !== undefined && origin !== new URL(config().BREATHMARK_PUBLIC_URL).origin) ||
    (site !== undefined && site !== 'same-origin')
  if (foreign || request.get('x-breathmark') !== '1') throw new AppError('cross-site')
  next()
}
