import { createTransport } from 'nodemailer'
import { env } from '../env.server'

export type Outgoing = { to: string; subject: string; text: string; html: string; messageId: string }
/** "caught": there is no mail server, the letter stays here for /mailbox. */
export type Delivery = 'sent' | 'caught'
export type Transport = { deliver: (letter: Outgoing) => Promise<Delivery>; close: () => void }

/** Sends over SMTP_URL; without one, catches. */
export function openTransport(smtpUrl = env.SMTP_URL, from = env.MAIL_FROM): Transport {
  if (!smtpUrl) return { deliver: async () => 'caught', close: () => {} }
  const smtp = createTransport(smtpUrl, { from })
  return {
    deliver: async (letter) => {
      await smtp.sendMail(letter)
      return 'sent'
    },
    close: () => smtp.close(),
  }
}
