import type { Db } from '@/lib/db/client'

export type OpenPullJar = Awaited<ReturnType<typeof listOpenPullJars>>[number]

/** What is still to be read of a study, in the order one would read it. */
export async function listOpenPullJars(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('pullJar as pj')
    .innerJoin('pull', 'pull.id', 'pj.pullId')
    .innerJoin('jar', 'jar.id', 'pj.jarId')
    .innerJoin('studyStation as ss', 'ss.id', 'pull.studyStationId')
    .select([
      'pj.id',
      'pj.version',
      'pj.asks',
      'pj.attribute',
      'pull.timeWeeks',
      'ss.temperatureC',
      'ss.isFreezeThaw',
      'ss.position',
      'jar.code',
      'jar.tareG',
      'jar.grossG',
    ])
    .where('pj.studyId', '=', studyId)
    .where('pj.state', '=', 'due')
    .orderBy('pull.timeWeeks')
    .orderBy('ss.position')
    .orderBy('jar.id')
    .execute()
  let last = -1
  let order = 0
  return rows.map((row) => {
    order = row.timeWeeks === last ? order + 1 : 0
    last = row.timeWeeks
    return { ...row, order }
  })
}
