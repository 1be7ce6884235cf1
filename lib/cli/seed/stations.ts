import { newId } from '@/lib/db/id'
import { createStation } from '@/lib/station/commands/keep-station'
import { logTemperatures } from '@/lib/station/commands/log-temperatures'
import { moveJars } from '@/lib/station/commands/move-jars'
import { planDowntime } from '@/lib/station/commands/plan-downtime'
import { listStandingJars } from '@/lib/station/queries/places'
import { newStation, type NewStation } from '@/lib/station/schema'
import { addDays } from '@/lib/study/rules/calendar'
import { daysAgo, type Filling } from './context'
import { isoDay, type Places } from './places'

const boughtDaysAgo = 40

/** Bought when the studies stood already: a second oven of 45 °C and a cabinet with lamps. Figures invented. */
const bought: (Partial<NewStation> & Pick<NewStation, 'name' | 'walkOrder'>)[] = [
  {
    name: 'oven 4',
    ...{ temperatureC: 45, lowC: 43, highC: 47, walkOrder: 7, shelves: 3, placesPerShelf: 24 },
    caution: 'Hot glass: gloves and eye protection.',
  },
  {
    name: 'lamp cabinet',
    ...{
      temperatureC: 25,
      lowC: 23,
      highC: 27,
      humidityPercent: 60,
      walkOrder: 8,
      shelves: 2,
      placesPerShelf: 20,
    },
    ...{ lightLux: 8000, lightUvWm2: 0.4, lightHours: 16 },
    caution: 'UV light: shut the lamps off before the door is opened.',
  },
]

/** Oven 3 is to be serviced, so one study's jars stand in the new oven at the same temperature. */
export async function tellStations(filling: Filling, places: Places, code: string): Promise<void> {
  const { hedda, mada } = filling.people
  const ids = await filling.act(hedda, daysAgo(filling, boughtDaysAgo), async (trx) => {
    const made = []
    for (const station of bought) {
      const id = newId()
      const kept = { lowC: null, highC: null, temperatureC: null, shelves: 1, placesPerShelf: 1 }
      await createStation(trx, hedda, newStation.parse({ id, kind: 'temperature', ...kept, ...station }))
      made.push({ id, celsius: station.temperatureC ?? 0 })
    }
    return made
  })
  await filling.act(mada, daysAgo(filling, 0, 7, 50), async (trx, now) => {
    for (const [index, { id, celsius }] of ids.entries()) {
      const readings = Array.from({ length: boughtDaysAgo }, (_, days) => ({
        id: newId(),
        measuredAt: daysAgo(filling, days, 7, 30).toISOString(),
        temperatureC: Math.round((celsius + 0.4 * Math.sin(days * 1.7 + index)) * 10) / 10,
        source: 'logger' as const,
      }))
      await logTemperatures(trx, mada, id, { readings }, now)
    }
  })
  const oven3 = places.stations.find((station) => station.name === 'oven 3')!
  const reason = 'Oven 3 rattles; the newest study waits for its service in oven 4.'
  await filling.act(
    mada,
    daysAgo(filling, 3, 15),
    async (trx, now) => {
      const jars = (await listStandingJars(trx, oven3.id)).filter((jar) => jar.studyCode === code)
      const jarIds = jars.map((jar) => jar.id)
      await moveJars(trx, mada, oven3.id, { id: newId(), toStationId: ids[0]!.id, jarIds, reason }, now)
    },
    reason,
  )
  const today = isoDay(filling.now)
  const why = 'Its fan is replaced.'
  await filling.act(
    hedda,
    daysAgo(filling, 2, 11),
    (trx, now) =>
      planDowntime(
        trx,
        hedda,
        oven3.id,
        { id: newId(), fromOn: addDays(today, 6), toOn: addDays(today, 8), reason: why },
        now,
      ),
    why,
  )
}
