/** The token of a link in a raw message, with the soft line breaks of quoted-printable taken out. */
export function linkIn(mail: string | undefined, kind: 'reset' | 'invitation'): string {
  const text = (mail ?? '').replace(/=\r?\n/g, '').replaceAll('=3D', '=')
  const token = new RegExp(`http://127\\.0\\.0\\.1:8080/${kind}/([\\w.-]+)`).exec(text)?.[1]
  if (!token) throw new Error(`No link in: ${text}`)
  return token
}
