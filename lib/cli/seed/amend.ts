import { newId } from '@/lib/db/id'
import { amendStudy } from '@/lib/study/commands/amend-study'
import { amendment } from '@/lib/study/schema'
import { daysAgo, type Filling } from './context'

/** The silicone-free cream comes apart at 45 °C, so its formulator looks at 40 °C sooner than was planned. */
export async function amendStory(filling: Filling, studyId: string, code: string): Promise<void> {
  const { liv } = filling.people
  const station = await filling.db
    .selectFrom('studyStation')
    .innerJoin('study', 'study.id', 'studyStation.studyId')
    .select(['studyStation.id', 'study.version'])
    .where('studyStation.studyId', '=', studyId)
    .where('studyStation.temperatureC', '=', 40)
    .executeTakeFirstOrThrow()
  const reason = 'It comes apart at 45 °C; at 40 °C its watch jar is looked at two weeks sooner.'
  const input = amendment.parse({
    kind: 'time point',
    id: newId(),
    version: station.version,
    reason,
    studyStationId: station.id,
    week: 14,
    isMeasured: false,
  })
  await filling.act(
    liv,
    daysAgo(filling, 9, 14),
    (trx, now) => amendStudy(trx, liv, code, input, now),
    reason,
  )
}
