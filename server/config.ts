import { createSecretKey, type KeyObject } from 'node:crypto'

export type Mode = 'production' | 'development' | 'demo' | 'test'

/** Settings of one process, read from the environment and checked at start. */
export interface Config {
  mode: Mode
  host: string
  port: number
  /** The address people type, for links in mail and the check of Origin. */
  baseUrl: string
  databaseUrl: string
  /** Signs access tokens; a key object, since a string costs a derivation at each use. */
  secret: KeyObject
  mailUrl: string
  mailFrom: string
  /** Folder where the development mail server leaves what it received; null elsewhere. */
  mailDir: string | null
  /** Folder with the built client; null where only the API is served. */
  clientDir: string | null
  isSecure: boolean
}

const SHORTEST_SECRET = 32 // [characters], 256 bits as hexadecimal are 64

/** @throws Error naming every missing or unusable setting at once */
export function readConfig(env: NodeJS.ProcessEnv): Config {
  const faults: string[] = []
  const need = (name: string): string => {
    const value = env[name]
    if (!value) faults.push(`${name} is not set.`)
    return value ?? ''
  }
  const mode = (env.WEIGHBACK_MODE ?? 'production') as Mode
  if (!['production', 'development', 'demo', 'test'].includes(mode)) faults.push(`WEIGHBACK_MODE "${mode}" is unknown: production, development, demo or test.`)
  const secret = need('WEIGHBACK_SECRET')
  if (secret && secret.length < SHORTEST_SECRET) faults.push(`WEIGHBACK_SECRET is shorter than ${SHORTEST_SECRET} characters: make a random one.`)
  const port = Number(env.WEIGHBACK_PORT ?? 8080)
  if (!Number.isInteger(port) || port < 0 || port > 65_535) faults.push(`WEIGHBACK_PORT "${env.WEIGHBACK_PORT}" is not a port.`)
  const host = env.WEIGHBACK_HOST ?? '127.0.0.1'
  const baseUrl = env.WEIGHBACK_BASE_URL ?? `http://${host}:${port}`
  const databaseUrl = need('WEIGHBACK_DATABASE_URL')
  const mailUrl = need('WEIGHBACK_MAIL_URL')
  if (faults.length > 0) throw new Error(`Weighback cannot start:\n${faults.map((fault) => `- ${fault}`).join('\n')}`)
  return {
    mode, host, port, baseUrl, databaseUrl, mailUrl,
    secret: createSecretKey(Buffer.from(secret)),
    mailFrom: env.WEIGHBACK_MAIL_FROM ?? 'Weighback <no-reply@weighback.example>',
    mailDir: mode === 'production' ? null : (env.WEIGHBACK_MAIL_DIR ?? null),
    clientDir: env.WEIGHBACK_CLIENT_DIR ?? null,
    isSecure: baseUrl.startsWith('https:'),
  }
}
