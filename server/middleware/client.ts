import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import express, { Router } from 'express'

/** The built client: its files with long life (their names carry a hash), and the page itself for every other address. */
export function client(folder: string): Router {
  const page = readFileSync(join(folder, 'index.html'), 'utf8')
  const router = Router()
  router.use('/assets', express.static(join(folder, 'assets'), { immutable: true, maxAge: '1y', fallthrough: false }))
  router.use(express.static(folder, { index: false, maxAge: 0 }))
  router.get('/{*path}', (request, response, next) => {
    if (!request.accepts('html')) return next()
    response.set('Cache-Control', 'no-store').type('html').send(page.replaceAll('%CSP_NONCE%', String(response.locals.nonce)))
  })
  return router
}
