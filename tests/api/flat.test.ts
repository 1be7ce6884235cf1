import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as bench } from '@/app/api/bench/route'
import { GET as jarPage } from '@/app/api/bench/[code]/route'
import { POST as log } from '@/app/api/pulls/[id]/readings/route'
import { newId } from '@/lib/db/id'
import { askedJars, benchStudy, jarAt, measured, planOfTest, type AskedJar } from '../support/bench-study'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { copyStudy } from '../support/many-studies'
import { countStatements } from '../support/statements'

// Common practice, no source: what a save costs must not grow with what the lab did before.

const plan = {
  ...planOfTest,
  stations: planOfTest.stations.map((station) => ({ ...station, timePoints: [1, 2, 3] })),
  attributes: planOfTest.attributes.map((one) => ({
    ...one,
    replicates: one.attribute === 'ph' ? 5 : one.replicates,
  })),
}
let database: TestDatabase
let technician: Signed
let jars: AskedJar[]
let study: Awaited<ReturnType<typeof benchStudy>>

beforeAll(async () => {
  database = await testDatabase()
  await database.lab()
  technician = await database.person('technician')
  const formulator = await database.person('formulator')
  const viscous = plan.attributes.map((one) =>
    one.attribute === 'viscosity' ? { ...one, replicates: 5 } : one,
  )
  study = await benchStudy(database.db, formulator.actor, 4, { ...plan, attributes: viscous })
  jars = await askedJars(database.db, study.studyId)
})
afterAll(() => database.close())

/** Five pH and five viscosities of one jar. */
function tenReadings(jar: AskedJar) {
  const body = measured(study, jar)
  return {
    ...body,
    readings: body.readings.flatMap((reading) =>
      [1, 2, 3, 4, 5].map((replicate) => ({ ...reading, id: newId(), replicate, isConfirmed: true })),
    ),
  }
}

async function costs(week: number) {
  const jar = jarAt(jars, 25, week)
  const save = await countStatements(async () => {
    const options = { cookie: technician.cookie, params: { id: jar.pullJarId }, body: tenReadings(jar) }
    const answer = await call(log, options)
    expect(answer.status, JSON.stringify(answer.body)).toBe(200)
    expect(answer.body.readings).toHaveLength(10)
  })
  const day = await countStatements(() => call(bench, { cookie: technician.cookie }))
  const page = await countStatements(() =>
    call(jarPage, { cookie: technician.cookie, params: { code: jarAt(jars, 45, week).code } }),
  )
  return { save: save.count, day: day.count, page: page.count }
}

describe('a thousand studies', () => {
  it('cost a save of ten readings, the Bench and a jar no more statements than one', async () => {
    const among = { one: await costs(1), few: await costs(2) }
    await copyStudy(database.owner, study.studyId, 1000)
    const many = await costs(3)
    expect(many).toEqual(among.few)
    expect(among.one.save).toBeLessThanOrEqual(15)
    expect(many.save).toBeLessThanOrEqual(15)
    expect(many.day).toBeLessThanOrEqual(8)
    expect(many.page).toBeLessThanOrEqual(8)
  }, 180_000)
})
