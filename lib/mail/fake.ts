import { createHash } from 'node:crypto'
import { mkdir, rename, writeFile } from 'node:fs/promises'
import type { AddressInfo } from 'node:net'
import path from 'node:path'
import { SMTPServer } from 'smtp-server'
import { env } from '@/lib/env'
import { parseMessage } from './message'

let running: string | null = null

/** Where the fake of this process listens; null where it does not run. */
export function fakeUrl(): string | null {
  return running
}

export function mailFolder(): string {
  return path.resolve(env().filesFolder, '..', 'mail')
}

/** Takes every message over real SMTP on loopback and keeps it as a file; nothing leaves the machine. */
export async function startMailFake(): Promise<{ close: () => Promise<void> }> {
  await mkdir(mailFolder(), { recursive: true })
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: 1_000_000,
    logger: false,
    onData: (stream, session, done) => {
      const chunks: Buffer[] = []
      stream.on('data', (chunk: Buffer) => chunks.push(chunk))
      stream.on('end', () => {
        const to = session.envelope.rcptTo.map((address) => address.address)
        keep(Buffer.concat(chunks).toString('utf8'), to).then(
          () => done(),
          (error: Error) => done(error),
        )
      })
    },
  })
  server.on('error', () => undefined)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()))
  running = `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`
  return {
    close: () =>
      new Promise((resolve) => {
        running = null
        server.close(() => resolve())
      }),
  }
}

// Written aside and renamed, so that the page never reads half a message.
async function keep(raw: string, to: string[]): Promise<void> {
  const message = parseMessage(raw)
  const id = createHash('sha256').update(message.messageId).digest('hex').slice(0, 32)
  const kept = {
    id,
    to,
    from: message.from,
    subject: message.subject,
    text: message.text,
    at: new Date().toISOString(),
  }
  const file = path.join(mailFolder(), `${id}.json`)
  await writeFile(`${file}.part`, JSON.stringify(kept, null, 2))
  await rename(`${file}.part`, file)
}
