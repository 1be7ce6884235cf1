import { demoPeople, type DemoPerson } from '@/fixtures/demo/people'
import { roles, type Actor } from '@/lib/auth/actor'
import { createDb, createPool, type Db } from '@/lib/db/client'
import { transact } from '@/lib/db/transact'
import { benchStudy, planOfTest } from './bench-study'
import { demoLab } from './e2e-labs'

export type WalkStudy = { db: Db; jars: { code: string; pullJarId: string }[]; close: () => Promise<void> }

/** A study of its own in the filled demo, with as many watch jars due as are asked for; closed when it was walked. */
export async function walkStudy(count: number): Promise<WalkStudy> {
  const pool = createPool(demoLab.env['DATABASE_URL']!, 2)
  const db = createDb(() => pool)
  const actor = await actorOf(db, 'liv')
  const each = Math.ceil(count / planOfTest.stations.length)
  const plan = {
    ...planOfTest,
    stations: planOfTest.stations.map((station) => ({ ...station, watchJars: each })),
  }
  const { studyId, stationIds } = await benchStudy(db, actor, 1, plan)
  const jars = await db
    .selectFrom('pullJar')
    .innerJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('jar', 'jar.id', 'pullJar.jarId')
    .select(['jar.code', 'pullJar.id as pullJarId'])
    .where('pullJar.studyId', '=', studyId)
    .where('pullJar.asks', '=', 'watch')
    .where('pull.timeWeeks', '=', 1)
    .orderBy('jar.code')
    .limit(count)
    .execute()
  return {
    db,
    jars,
    close: async () => {
      await transact(db, actor, {}, async (trx) => {
        await trx.updateTable('study').set({ state: 'closed' }).where('id', '=', studyId).execute()
        const ids = Object.values(stationIds)
        await trx.updateTable('station').set({ isActive: false }).where('id', 'in', ids).execute()
      })
      await db.destroy()
    },
  }
}

async function actorOf(db: Db, key: DemoPerson): Promise<Actor> {
  const { name } = demoPeople.find((person) => person.key === key)!
  const row = await db
    .selectFrom('person')
    .select(['id', 'name', 'initials', 'email', 'roles'])
    .where('name', '=', name)
    .executeTakeFirstOrThrow()
  const { id, ...person } = row
  return {
    ...person,
    personId: id,
    roles: roles.filter((role) => person.roles.includes(role)),
    ...{ clientId: null, sessionId: '', requestId: '', isDemo: true },
  }
}
