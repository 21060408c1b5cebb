import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

/**
 * A mail server on loopback for development: takes every letter, keeps it as .eml and as .json that the
 * application shows at /mail, and delivers nothing.
 */
export async function startMailFake(folder, port = 0) {
  const { SMTPServer } = await import('smtp-server')
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  let count = 0
  const server = new SMTPServer({
    authOptional: true, disabledCommands: ['AUTH', 'STARTTLS'], logger: false, size: 20_000_000,
    onData: (stream, session, done) => {
      const parts = []
      stream.on('data', (part) => parts.push(part))
      stream.on('end', () => {
        const raw = Buffer.concat(parts)
        const name = `${new Date().toISOString().replaceAll(/[:.]/g, '-')}-${String(++count).padStart(4, '0')}`
        writeFileSync(join(folder, `${name}.eml`), raw)
        writeFileSync(join(folder, `${name}.json`), JSON.stringify(letterOf(name, raw.toString('utf8'), session.envelope)))
        done()
      })
    },
  })
  await new Promise((resolve, reject) => {
    server.on('error', reject)
    server.listen(port, '127.0.0.1', resolve)
  })
  return { port: server.server.address().port, stop: () => new Promise((resolve) => server.close(resolve)) }
}

function letterOf(id, raw, envelope) {
  const [head, ...rest] = raw.split(/\r?\n\r?\n/)
  const headers = Object.fromEntries(head.replace(/\r?\n[ \t]+/g, ' ').split(/\r?\n/).map((line) => {
    const colon = line.indexOf(':')
    return [line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim()]
  }))
  const boundary = /boundary="?([^";]+)"?/.exec(headers['content-type'] ?? '')?.[1]
  const body = rest.join('\n\n')
  const parts = boundary ? body.split(`--${boundary}`) : [`\n\n${body}`]
  const plain = parts.find((part) => /text\/plain/i.test(part)) ?? parts.at(0) ?? ''
  return {
    id, at: new Date().toISOString(), from: headers.from ?? '', to: envelope.rcptTo.map(({ address }) => address),
    subject: decodeWords(headers.subject ?? ''), text: decodeBody(plain),
  }
}

/** RFC 2047 words in a header. */
const decodeWords = (text) => text.replace(/=\?utf-8\?([bq])\?([^?]*)\?=\s*/gi, (_all, kind, word) =>
  kind.toLowerCase() === 'b' ? Buffer.from(word, 'base64').toString('utf8') : fromQuotedPrintable(word.replaceAll('_', ' ')))

function decodeBody(part) {
  const [head = '', ...rest] = part.trimStart().split(/\r?\n\r?\n/)
  const hasHead = /^content-/im.test(head)
  const body = hasHead ? rest.join('\n\n') : part
  if (/quoted-printable/i.test(head)) return fromQuotedPrintable(body.replace(/=\r?\n/g, '')).trim()
  if (/base64/i.test(head)) return Buffer.from(body, 'base64').toString('utf8').trim()
  return body.trim()
}

const fromQuotedPrintable = (text) =>
  Buffer.from(text.replace(/=([0-9A-F]{2})/gi, (_all, hex) => String.fromCharCode(Number.parseInt(hex, 16))), 'latin1').toString('utf8')
