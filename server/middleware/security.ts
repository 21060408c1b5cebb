import { randomBytes } from 'node:crypto'
import type { RequestHandler } from 'express'
import helmet from 'helmet'
import type { Config } from '../config'
import { Problem } from '../problem'

const YEAR_SECONDS = 31_536_000
const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])

/** A fresh nonce per answer, for the style elements that PrimeVue makes. */
export const makeNonce: RequestHandler = (_request, response, next) => {
  response.locals.nonce = randomBytes(16).toString('base64')
  next()
}

export const headers = (config: Config): RequestHandler => helmet({
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: ["'self'"],
      scriptSrc: ["'self'"],
      styleSrc: ["'self'", (_request, response) => `'nonce-${String((response as unknown as { locals: { nonce: string } }).locals.nonce)}'`],
      imgSrc: ["'self'", 'data:', 'blob:'],
      fontSrc: ["'self'"],
      connectSrc: ["'self'"],
      workerSrc: ["'self'"],
      manifestSrc: ["'self'"],
      objectSrc: ["'none'"],
      baseUri: ["'none'"],
      formAction: ["'self'"],
      frameAncestors: ["'none'"],
    },
  },
  strictTransportSecurity: config.isSecure ? { maxAge: YEAR_SECONDS, includeSubDomains: true } : false,
  referrerPolicy: { policy: 'same-origin' },
  crossOriginOpenerPolicy: { policy: 'same-origin' },
  xFrameOptions: { action: 'deny' },
})

/**
 * Cookies travel with any request a page makes, so a request that changes something must come from
 * our own pages: by its Origin or Sec-Fetch-Site, and with a header that no form can send.
 */
export const refuseForged = (config: Config): RequestHandler => {
  const own = new URL(config.baseUrl).origin
  return (request, _response, next) => {
    if (SAFE.has(request.method)) return next()
    const origin = request.get('origin')
    const site = request.get('sec-fetch-site')
    const isOwnHost = origin === own || origin === `${request.protocol}://${request.get('host') ?? ''}`
    if ((origin && !isOwnHost) || (site && site !== 'same-origin') || request.get('x-requested-with') !== 'weighback') throw new Problem('forged-request')
    const hasBody = Number(request.get('content-length') ?? 0) > 0 || request.get('transfer-encoding') !== undefined
    if (hasBody && !request.is('application/json')) throw new Problem('unsupported-media-type')
    next()
  }
}
