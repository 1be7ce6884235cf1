import { freePort } from '../cluster/server.mjs'
import { pause } from '../steps.mjs'
import { startWebServer, waitForAnswer } from '../serve.mjs'
import { atMost, plain, type Figure } from '../bench/figure'
import { askedJars, benchStudy, layered, measured, type AskedJar } from '@/tests/support/bench-study'
import { testDatabase, type TestDatabase } from '@/tests/support/database'
import { newId } from '@/lib/db/id'
import { countKept } from './kept'

type Save = { url: string; body: { readings: { id: string }[] } & Record<string, unknown>; key: string }
type Options = { root: string; saves: number; kills: number; writers: number; say?: (line: string) => void }

const times = (count: number) => String(count)

/**
 * The server is killed without warning while several people save; it comes back, they send again what was not
 * acknowledged, five times at once, as a nervous tablet might. What was acknowledged must then stand exactly once, with
 * its trail. Needs a build and the tests' database server.
 */
export async function killServer({ root, saves, kills, writers, say = () => undefined }: Options) {
  const database = await testDatabase()
  const port = await freePort(4700)
  const origin = `http://127.0.0.1:${port}`
  const env = {
    ...process.env,
    DATABASE_URL: database.url('stillstand_app'),
    HOST: '127.0.0.1',
    PORT: String(port),
    PUBLIC_URL: origin,
    STILLSTAND_DEMO: 'off',
    STILLSTAND_FILES: `${root}/.data/test/faults`,
    LOG_LEVEL: 'error',
  }
  const start = async () => {
    const server = startWebServer({ root, env, host: '127.0.0.1', port, onLine: () => undefined })
    await waitForAnswer(server, { host: '127.0.0.1', port })
    return server
  }
  let server = await start()
  try {
    const waiting = await savesOf(database, saves)
    const cookies = await Promise.all(
      Array.from({ length: writers }, async () => (await database.person('technician')).cookie),
    )
    const done: Save[] = []
    const refused: string[] = []
    let sentAgain = 0

    async function write(cookie: string) {
      for (let save = waiting.shift(); save; save = waiting.shift()) {
        let answer = await post(origin, cookie, save)
        while (answer === null) {
          await pause(60)
          sentAgain += 1
          const answers = await Promise.all(Array.from({ length: 5 }, () => post(origin, cookie, save!)))
          const reached = answers.filter((one) => one !== null)
          // One that broke off says nothing about the others: what was acknowledged at all must hold.
          answer = reached.find((one) => one.status === 200) ?? reached[0] ?? null
        }
        if (answer.status === 200) done.push(save)
        else refused.push(`${answer.status} ${answer.text.slice(0, 160)}`)
      }
    }

    const writing = Promise.all(cookies.map(write))
    let killed = 0
    for (const after of instants(saves, kills)) {
      while (done.length + refused.length < after && waiting.length > 0) await pause(2)
      await pause(Math.random() * 40)
      process.kill(-server.pid!, 'SIGKILL')
      await server.ended
      killed += 1
      say(`killed with ${done.length} of ${saves} acknowledged`)
      server = await start()
    }
    await writing
    const kept = await countKept(
      database,
      done.map((save) => save.body.readings.map((reading) => reading.id)),
    )
    const figures: Figure[] = [
      plain('saves, writers', `${saves}, ${writers}`),
      { ...plain('the server killed', times(killed)), target: String(kills), isMet: killed === kills },
      plain('saves sent again, five times at once', times(sentAgain)),
      { ...plain('acknowledged', times(done.length)), target: String(saves), isMet: done.length === saves },
      atMost('refused', refused.length, 0, times),
      ...kept,
    ]
    return { figures, refused }
  } finally {
    await server.stop()
    await database.close()
  }
}

/** So many moments, each at another count of saves, in order. */
function instants(saves: number, kills: number): number[] {
  const step = (saves * 0.9) / kills
  return Array.from({ length: kills }, (_, i) => Math.floor(step * (i + Math.random())))
}

/** Jars of studies that have run to their end and of which nothing was read. */
async function savesOf(database: TestDatabase, count: number): Promise<Save[]> {
  await database.lab()
  const formulator = (await database.person('formulator')).actor
  const saves: Save[] = []
  while (saves.length < count) {
    const study = await benchStudy(database.db, formulator, 13)
    const jars = await askedJars(database.db, study.studyId)
    for (const jar of jars.slice(0, count - saves.length)) saves.push(saveOf(study, jar))
  }
  return saves
}

function saveOf(study: Parameters<typeof measured>[0], jar: AskedJar): Save {
  const body = jar.asks === 'watch' ? layered(study, jar, 0, 0.6) : measured(study, jar)
  const readings = body.readings.map((reading) => ({ ...reading, isConfirmed: true }))
  return { url: `/api/pulls/${jar.pullJarId}/readings`, body: { ...body, readings }, key: newId() }
}

/** Null where the server was not there to answer, or said that it cannot just now. */
async function post(origin: string, cookie: string, { url, body, key }: Save) {
  try {
    const response = await fetch(`${origin}${url}`, {
      method: 'POST',
      headers: { cookie, origin, 'idempotency-key': key, 'content-type': 'application/json' },
      body: JSON.stringify(body),
      signal: AbortSignal.timeout(20_000),
    })
    const text = await response.text()
    return response.status >= 500 || response.status === 429 ? null : { status: response.status, text }
  } catch {
    return null
  }
}
