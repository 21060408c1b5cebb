import { createServer } from 'node:http'
import { createApp } from './app'
import { readConfig } from './config'
import { startJobs } from './jobs'
import { closeHouse, openHouse } from './start'

const config = readConfig(process.env)
const house = await openHouse(config)
const server = createServer(createApp(house))
const stopJobs = startJobs(house)

server.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code === 'EADDRINUSE') house.log.fatal(`Port ${config.port} is taken by another program. Stop that one, or start with another: WEIGHBACK_PORT=${config.port + 1} npm start`)
  else house.log.fatal({ err: error }, 'The server cannot listen.')
  process.exit(1)
})
server.listen(config.port, config.host, () => house.log.info(`Weighback serves ${config.baseUrl}`))

let isStopping = false
for (const signal of ['SIGINT', 'SIGTERM'] as const)
  process.on(signal, () => {
    if (isStopping) return
    isStopping = true
    stopJobs().then(() => server.close(() => { void closeHouse(house).then(() => process.exit(0)) }), () => process.exit(1))
    server.closeIdleConnections()
  })
