import { createServer } from 'node:net'
import { Stop } from './say.mjs'

/** Why nobody may listen there now: an error code such as EADDRINUSE, or null if the port is free. */
export function whyNotFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.once('error', (error) => resolve(error.code ?? 'unknown'))
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(null)))
  })
}

export function anyFreePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.once('error', reject)
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address()
      probe.close(() => resolve(port))
    })
  })
}

/** The first free port from `first` on, wrapping round inside `count` ports. */
export async function freePortFrom(first, { base, count }) {
  for (let step = 0; step < Math.min(count, 200); step++) {
    const port = base + ((first - base + step) % count)
    if ((await whyNotFree(port)) === null) return port
  }
  return anyFreePort()
}

/** The port a person asked for, or the usual one. @throws Stop if it cannot be had */
export async function chosenPort(name, usual, host) {
  const text = process.env[name] ?? String(usual)
  const port = Number(text)
  if (!Number.isInteger(port) || port < 1 || port > 65_535)
    throw new Stop(`${name}=${text} is not a port: it must be a whole number from 1 to 65535.`)
  const why = await whyNotFree(port, host)
  const other = `${name}=${port < 65_535 ? port + 1 : port - 1}`
  if (why === 'EADDRINUSE')
    throw new Stop(`Port ${port} is taken by another program. Stop that one, or choose another port: ${other} npm start`)
  if (why === 'EACCES')
    throw new Stop(`This user may not open port ${port}; below 1024 only root may. Choose another: ${name}=8080 npm start`)
  if (why !== null) throw new Stop(`Nothing can listen on ${host}, port ${port} (${why}). Look at WEIGHBACK_HOST and ${name}.`)
  return port
}
