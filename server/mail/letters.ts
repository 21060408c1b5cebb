import { say } from '../language'
import type { Letter } from './mailer'

const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`)

/** A letter with one link: a greeting, what it is for, the address, what to do if it came by mistake. */
function linkLetter(kind: 'invitation' | 'reset', locale: string, to: string, link: string, params: Record<string, string>): Letter {
  const line = (part: string): string => say(locale, `mail.${kind}.${part}`, params)
  const paragraphs = [line('greeting'), line('purpose')]
  const closing = [line('expires'), line('mistake')]
  return {
    to,
    subject: line('subject'),
    text: [...paragraphs, link, ...closing].join('\n\n'),
    html: [
      ...paragraphs.map((text) => `<p>${escapeHtml(text)}</p>`),
      `<p><a href="${escapeHtml(link)}">${escapeHtml(line('action'))}</a></p>`,
      ...closing.map((text) => `<p>${escapeHtml(text)}</p>`),
    ].join('\n'),
  }
}

export const invitationLetter = (locale: string, to: string, link: string, params: { name: string; company: string; inviter: string }): Letter =>
  linkLetter('invitation', locale, to, link, params)
export const resetLetter = (locale: string, to: string, link: string, params: { name: string }): Letter =>
  linkLetter('reset', locale, to, link, params)
