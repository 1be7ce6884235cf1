import { createHash } from 'node:crypto'
import { rm, writeFile } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { pressCycle } from '@/lib/cycle/commands/press'
import { cyclePress, type CyclePressInput } from '@/lib/cycle/schema'
import { newId } from '@/lib/db/id'
import { checkInstrument } from '@/lib/instrument/commands/check'
import { dailyChecked } from '@/lib/instrument/schema'
import { keepLot } from '@/lib/lot/commands'
import { newLot } from '@/lib/lot/schema'
import { takeLoggerFile } from '@/lib/station/commands/take-logger-file'
import { addDays } from '@/lib/study/rules/calendar'
import { isoDay, type Places } from './places'
import { daysAgo, type Filling } from './context'

type InCycle = { running: string; overdue: string }

/** What today's technician finds: bottles in use, instruments checked, a logger's file, and two freezers in cycle. */
export async function tellMorning(filling: Filling, places: Places, studies: InCycle): Promise<void> {
  await fillLots(filling)
  await checkInstruments(filling, places)
  await takeHotWeekend(filling, places)
  await cycle(filling, studies.running, [{ press: 'begin', cycle: 4, half: 'cold' }, 10])
  await cycle(
    filling,
    studies.overdue,
    [{ press: 'begin', cycle: 2, half: 'cold' }, 63],
    [{ press: 'end', cycle: 2, half: 'cold', reachedC: -10.4, coreC: -9.6, isFrozenThrough: true }, 38],
    [{ press: 'begin', cycle: 2, half: 'warm' }, 37],
  )
}

async function fillLots(filling: Filling): Promise<void> {
  const { mada } = filling.people
  const day = (ahead: number) => addDays(isoDay(filling.now), ahead)
  const values = (...of: [number, number][]) => of.map(([temperatureC, value]) => ({ temperatureC, value }))
  const lots = [
    {
      kind: 'buffer',
      name: 'buffer 4.01',
      lot: 'FB-2214',
      expiresOn: day(320),
      openedOn: day(-20),
      keepsDays: 60,
    },
    {
      kind: 'buffer',
      name: 'buffer 7.00',
      lot: 'FB-2198',
      expiresOn: day(250),
      openedOn: day(-75),
      keepsDays: 60,
    },
    {
      kind: 'check fluid',
      name: 'silicone fluid 5000',
      lot: 'FS-031',
      expiresOn: day(500),
      openedOn: day(-140),
    },
  ] as const
  const certificates = [
    values([20, 4.0], [25, 4.01], [30, 4.02]),
    values([20, 7.02], [25, 7.0], [30, 6.99]),
    values([20, 5540], [25, 5000], [30, 4530]),
  ]
  await filling.act(mada, daysAgo(filling, 1, 15), async (trx) => {
    for (const [index, lot] of lots.entries())
      await keepLot(trx, mada, newLot.parse({ id: newId(), certificate: certificates[index], ...lot }))
  })
}

async function checkInstruments(filling: Filling, { instruments }: Places): Promise<void> {
  const { mada, jos } = filling.people
  const seen = [
    { who: jos, days: 1, id: instruments.balance, read: 50, temperatureC: null },
    { who: jos, days: 1, id: instruments.ph, read: 6.88, temperatureC: 24 },
    { who: jos, days: 1, id: instruments.viscometer, read: 5040, temperatureC: 25 },
    { who: mada, days: 0, id: instruments.balance, read: 50, temperatureC: null },
    { who: mada, days: 0, id: instruments.viscometer, read: 4975, temperatureC: 25 },
  ]
  for (const { who, days, id, ...shown } of seen) {
    await filling.act(who, daysAgo(filling, days, 7, 20), (trx, now) =>
      checkInstrument(trx, who, id, dailyChecked.parse({ id: newId(), ...shown }), now),
    )
  }
}

/** The weekend on which the room cabinet was hot, as its logger wrote it: every ten minutes, two rows spoilt. */
async function takeHotWeekend(filling: Filling, places: Places): Promise<void> {
  const { mada } = filling.people
  const station = places.stations.find((one) => one.name === 'room cabinet')!
  const from = daysAgo(filling, 143, 13).getTime()
  const rows = Array.from({ length: 3 * 144 }, (_, i) => {
    const hot = Math.max(0, Math.min(1, (i - 40) / 60, (380 - i) / 50))
    const celsius = 25.1 + hot * 6.2 + Math.sin(i / 23) * 0.3 + filling.noise.normal() * 0.08
    const at = new Date(from + i * 600_000).toISOString().slice(0, 19)
    return `${i + 1};${at}Z;${i === 77 || i === 210 ? '---' : celsius.toFixed(1).replace('.', ',')}`
  })
  const text = `Logger R-2, room cabinet\nNo.;Time;Temperature (°C)\n${rows.join('\n')}\n`
  const file = path.join(os.tmpdir(), `stillstand-demo-${newId()}.csv`)
  await writeFile(file, text)
  try {
    await filling.act(mada, daysAgo(filling, 139, 9), (trx, now) =>
      takeLoggerFile(
        trx,
        mada,
        station.id,
        {
          path: file,
          sha256: createHash('sha256').update(text).digest('hex'),
          bytes: Buffer.byteLength(text),
          type: 'text/plain',
          originalName: 'room-cabinet.csv',
        },
        { id: newId(), isTaken: true, order: null, unit: null, column: null },
        now,
      ),
    )
  } finally {
    await rm(file, { force: true })
  }
}

type Told<P> = P extends { press: 'begin' | 'end' } ? Omit<P, 'id' | 'studyStationId'> : never
type Step = [press: Told<CyclePressInput>, hoursAgo: number]

async function cycle(filling: Filling, studyId: string, ...steps: Step[]): Promise<void> {
  const { mada } = filling.people
  const place = await filling.db
    .selectFrom('studyStation')
    .select('id')
    .where('studyId', '=', studyId)
    .where('isFreezeThaw', '=', true)
    .executeTakeFirstOrThrow()
  for (const [press, hoursAgo] of steps) {
    await filling.act(mada, new Date(filling.now.getTime() - hoursAgo * 3_600_000), (trx, now) =>
      pressCycle(trx, mada, cyclePress.parse({ id: newId(), studyStationId: place.id, ...press }), now),
    )
  }
}
