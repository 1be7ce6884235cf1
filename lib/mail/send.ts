import nodemailer from 'nodemailer'
import { env } from '@/lib/env'
import { fakeUrl } from './fake'

export type Mail = { to: string; subject: string; text: string }

/**
 * id names the event, not the attempt: a repeated job sends the same Message-ID again, by which a reader's
 * mailbox (and the fake) knows it as the one it has.
 */
export async function sendMail(mail: Mail, id: string): Promise<void> {
  const { smtpUrl, mailFrom, publicUrl } = env()
  const url = smtpUrl ?? fakeUrl()
  if (!url)
    throw new Error('No mail server: set SMTP_URL, or send from the worker, which runs the mail fake.')
  const transport = nodemailer.createTransport({
    url,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 20_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  })
  try {
    await transport.sendMail({
      from: mailFrom,
      to: mail.to,
      subject: mail.subject,
      text: mail.text,
      textEncoding: 'base64',
      messageId: `<${id}@${new URL(publicUrl).hostname}>`,
      headers: { 'Auto-Submitted': 'auto-generated' },
    })
  } finally {
    transport.close()
  }
}
