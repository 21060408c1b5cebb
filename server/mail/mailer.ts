import nodemailer from 'nodemailer'
import type { Config } from '../config'

/** One letter: plain text and HTML say the same. */
export interface Letter {
  to: string
  subject: string
  text: string
  html: string
}

/** Hands letters to the mail server over SMTP. */
export interface Mailer {
  /** @throws Error if the mail server does not take the letter */
  send(letter: Letter): Promise<void>
  close(): void
}

/** Line breaks in a header would let data add headers of its own. */
const oneLine = (text: string): string => text.replace(/[\r\n]+/g, ' ')

export function smtpMailer(config: Config): Mailer {
  const transport = nodemailer.createTransport(config.mailUrl, { from: config.mailFrom })
  return {
    send: async (letter) => {
      await transport.sendMail({ ...letter, to: oneLine(letter.to), subject: oneLine(letter.subject) })
    },
    close: () => transport.close(),
  }
}
