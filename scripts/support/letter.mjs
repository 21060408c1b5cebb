/**
 * Reads what a person sees of a letter: subject, plain text and HTML. Enough of RFC 5322, 2045 to 2047 for the
 * letters that the application itself writes, in UTF-8; not a reader for mail from elsewhere.
 * @param raw  the whole letter as bytes
 */
export function readLetter(raw) {
  const letter = readPart(raw.toString('latin1')) // one character per byte until the encoding is known
  const leaves = leavesOf(letter)
  const body = (type) => leaves.find((leaf) => leaf.type === type)?.text ?? ''
  return { from: decodeWords(letter.headers.from ?? ''), subject: decodeWords(letter.headers.subject ?? ''), text: body('text/plain'), html: body('text/html') }
}

function readPart(source) {
  const [head, ...rest] = source.split(/\r?\n\r?\n/)
  const headers = {}
  for (const line of head.replace(/\r?\n[ \t]+/g, ' ').split(/\r?\n/)) {
    const colon = line.indexOf(':')
    if (colon > 0) headers[line.slice(0, colon).toLowerCase()] = line.slice(colon + 1).trim()
  }
  return { headers, body: rest.join('\r\n\r\n') }
}

function leavesOf({ headers, body }) {
  const type = headers['content-type'] ?? 'text/plain'
  const boundary = /boundary="?([^";]+)"?/i.exec(type)?.[1]
  if (boundary) {
    const parts = body.split(`--${boundary}`).slice(1, -1) // before the first and after the last there is nothing to read
    return parts.flatMap((part) => leavesOf(readPart(part.replace(/^\r?\n/, '').replace(/\r?\n$/, ''))))
  }
  return [{ type: type.split(';')[0].trim().toLowerCase(), text: decodeBody(body, headers['content-transfer-encoding']).trimEnd() }]
}

function decodeBody(body, encoding = '7bit') {
  if (encoding.toLowerCase() === 'base64') return Buffer.from(body, 'base64').toString('utf8')
  const bytes = encoding.toLowerCase() === 'quoted-printable' ? fromQuoted(body.replace(/=\r?\n/g, '')) : body
  return Buffer.from(bytes, 'latin1').toString('utf8').replace(/\r\n/g, '\n')
}

const fromQuoted = (text) => text.replace(/=([0-9A-F]{2})/gi, (_all, hex) => String.fromCharCode(Number.parseInt(hex, 16)))

/** Encoded words of RFC 2047; white space between two of them does not count. */
function decodeWords(text) {
  return text
    .replace(/\?=\s+=\?/g, '?==?')
    .replace(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_all, kind, word) =>
      kind.toLowerCase() === 'b' ? Buffer.from(word, 'base64').toString('utf8') : Buffer.from(fromQuoted(word.replaceAll('_', ' ')), 'latin1').toString('utf8'))
}
