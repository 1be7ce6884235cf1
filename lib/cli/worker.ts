import { appPool } from '@/lib/db/client'
import { env } from '@/lib/env'
import { log } from '@/lib/http/log'
import { runJobs } from '@/lib/jobs/run'
import { startMailFake } from '@/lib/mail/fake'

// The job worker: mail, previews, sealing. Without SMTP_URL it also runs the mail fake.

const fake = env().smtpUrl === null ? await startMailFake() : null
const running = await runJobs()
log.info({ mail: fake ? 'fake' : 'smtp' }, 'the job worker runs')

let isStopping = false
for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    if (isStopping) return
    isStopping = true
    void stop()
  })
}

async function stop(): Promise<void> {
  await running.stop()
  await fake?.close()
  await appPool().end()
  process.exit(0)
}
