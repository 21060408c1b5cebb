import { readdir, readFile } from 'node:fs/promises'
import { join } from 'node:path'
import accounts from '../../../fixtures/demo/accounts.json'
import type { House } from '../../house'
import { notFound } from '../../problem'

const MOST_LETTERS = 50

/** The demo accounts with their passwords: only where the demo company is what this server is for. */
export function readDemoAccounts(house: House): typeof accounts {
  if (house.config.mode === 'production') throw notFound('page')
  return accounts
}

/** What the local mail server of development and tests received, newest first. */
export async function readDevelopmentMail(house: House): Promise<unknown[]> {
  const folder = house.config.mailDir
  if (!folder) throw notFound('page')
  const names = (await readdir(folder).catch(() => [])).filter((name) => name.endsWith('.json')).sort().reverse().slice(0, MOST_LETTERS)
  return Promise.all(names.map(async (name) => JSON.parse(await readFile(join(folder, name), 'utf8')) as unknown))
}
