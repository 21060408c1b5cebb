import type { Logger } from 'pino'
import type { Config } from './config'
import type { Database } from './database'
import type { Mailer } from './mail/mailer'

/** What a running server is made of; handed to the routes, never global. */
export interface House {
  config: Config
  database: Database
  mailer: Mailer
  log: Logger
  /** The clock: tests hand in their own. */
  now: () => Date
}
