import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { readLetter } from './letter.mjs'

const MOST_LETTERS = 200 // older ones are removed

/**
 * Starts a mail server on loopback that sends nothing on: each letter is kept in a folder, as it came (.eml)
 * and as JSON for the page that shows it.
 * @returns the address for WEIGHBACK_MAIL_URL
 */
export async function startMailFake({ folder, atEnd }) {
  const { SMTPServer } = await import('smtp-server') // only there once the packages are installed
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  let count = 0
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    logger: false,
    onData: (stream, session, done) => {
      const parts = []
      stream.on('data', (part) => parts.push(part))
      stream.on('end', () => {
        try {
          keep(folder, ++count, Buffer.concat(parts), session)
          done()
        } catch (error) {
          done(error) // the sender learns it, as from any mail server
        }
      })
    },
  })
  server.on('error', () => {}) // a broken connection; the sender has it as well
  await new Promise((resolve, reject) => {
    server.server.once('error', reject)
    server.listen(0, '127.0.0.1', resolve)
  })
  atEnd(() => new Promise((resolve) => server.close(() => resolve())))
  return `smtp://127.0.0.1:${server.server.address().port}?ignoreTLS=true`
}

function keep(folder, count, raw, session) {
  const receivedAt = new Date().toISOString()
  const id = `${receivedAt.replace(/[-:.]/g, '')}-${String(count).padStart(4, '0')}`
  const recipients = session.envelope.rcptTo.map(({ address }) => address)
  writeFileSync(join(folder, `${id}.eml`), raw)
  writeFileSync(join(folder, `${id}.json`), JSON.stringify({ id, sentAt: receivedAt, to: recipients.join(', '), ...readLetter(raw) }, null, 2))
  const ids = readdirSync(folder).filter((name) => name.endsWith('.json')).map((name) => name.slice(0, -'.json'.length)).sort()
  for (const old of ids.slice(0, -MOST_LETTERS)) for (const ending of ['eml', 'json']) rmSync(join(folder, `${old}.${ending}`), { force: true })
}
