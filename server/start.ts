import { pino } from 'pino'
import type { Config } from './config'
import { Database, openDatabase } from './database'
import type { House } from './house'
import { smtpMailer } from './mail/mailer'

/** Opens what a server needs. The caller closes it with `closeHouse`. */
export async function openHouse(config: Config, now: () => Date = () => new Date()): Promise<House> {
  const log = pino({ level: config.mode === 'test' ? (process.env.WEIGHBACK_LOG ?? 'error') : 'info' })
  const source = await openDatabase(config.databaseUrl).initialize()
  return { config, database: new Database(source), mailer: smtpMailer(config), log, now }
}

export async function closeHouse(house: House): Promise<void> {
  house.mailer.close()
  await house.database.source.destroy()
}
