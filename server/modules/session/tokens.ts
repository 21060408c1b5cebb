import { createHash, randomBytes, timingSafeEqual } from 'node:crypto'
import type { KeyObject } from 'node:crypto'
import jwt from 'jsonwebtoken'

export const ACCESS_SECONDS = 600
const SECRET_BYTES = 32
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/

/** What an access token says: which session of which company. Who that is, the database says. */
export interface AccessClaims {
  companyId: string
  sessionId: string
}

export const signAccess = (claims: AccessClaims, secret: KeyObject): string =>
  jwt.sign({ com: claims.companyId, sid: claims.sessionId }, secret, { algorithm: 'HS256', expiresIn: ACCESS_SECONDS })

/** The claims of a token that is ours and not expired; null for anything else. */
export function readAccess(token: string, secret: KeyObject): AccessClaims | null {
  try {
    const claims = jwt.verify(token, secret, { algorithms: ['HS256'] })
    if (typeof claims === 'string' || !UUID.test(claims.com) || !UUID.test(claims.sid)) return null
    return { companyId: claims.com, sessionId: claims.sid }
  } catch {
    return null
  }
}

export const hashOf = (secret: string): Buffer => createHash('sha256').update(secret).digest()
export const sameHash = (a: Buffer, b: Buffer): boolean => a.length === b.length && timingSafeEqual(a, b)

/**
 * A token that leads to its row: company, row id and a secret of which only the hash is stored.
 * Used for refresh cookies and for the links in mails.
 */
export interface RowToken {
  companyId: string
  rowId: string
  secret: string
}
export const newSecret = (): string => randomBytes(SECRET_BYTES).toString('base64url')
export const writeRowToken = ({ companyId, rowId, secret }: RowToken): string => `${companyId}.${rowId}.${secret}`
export function readRowToken(text: string): RowToken | null {
  const [companyId = '', rowId = '', secret = '', more] = text.split('.')
  return UUID.test(companyId) && UUID.test(rowId) && secret && more === undefined ? { companyId, rowId, secret } : null
}
