import { createServer } from 'node:http'
import { existsSync } from 'node:fs'
import { createServer as createProbe } from 'node:net'
import { randomBytes } from 'node:crypto'
import { resolve } from 'node:path'
import { createApp } from '../../server/app'
import { readConfig } from '../../server/config'
import { loadDemo } from '../../server/demo/load'
import type { House } from '../../server/house'
import { closeHouse, openHouse } from '../../server/start'
import { appUrl, dropDatabase, makeDatabase } from './database'

/** The whole application with the demo company, listening on loopback as a browser finds it. */
export interface Application {
  baseUrl: string
  house: House
  close: () => Promise<void>
}

const CLIENT = resolve(process.env.WEIGHBACK_TEST_BUILD ?? '.build', 'client')

export async function anApplication(): Promise<Application> {
  if (!existsSync(CLIENT)) throw new Error('The client is not built: run the tests by `npm test`, which builds it.')
  const database = await makeDatabase()
  const port = await freePort()
  const baseUrl = `http://127.0.0.1:${port}`
  const house = await openHouse(readConfig({
    WEIGHBACK_MODE: 'test', WEIGHBACK_SECRET: randomBytes(32).toString('hex'), WEIGHBACK_DATABASE_URL: appUrl(database), WEIGHBACK_MAIL_URL: 'smtp://127.0.0.1:9',
    WEIGHBACK_BASE_URL: baseUrl, WEIGHBACK_PORT: String(port), WEIGHBACK_CLIENT_DIR: CLIENT,
  }))
  await loadDemo(house.database, house.now())
  const server = createServer(createApp(house))
  await new Promise<void>((listening) => server.listen(port, '127.0.0.1', listening))
  return {
    baseUrl, house,
    close: async () => {
      server.closeAllConnections()
      await new Promise((closed) => server.close(closed))
      await closeHouse(house)
      await dropDatabase(database)
    },
  }
}

function freePort(): Promise<number> {
  return new Promise((found, failed) => {
    const probe = createProbe().once('error', failed)
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address()
      probe.close(() => (address && typeof address === 'object' ? found(address.port) : failed(new Error('No port.'))))
    })
  })
}
