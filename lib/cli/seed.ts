import { demoPeople } from '@/fixtures/demo/people'
import { databaseUrl } from '@/lib/env'
import { demoPassword } from '@/lib/lab/rules'
import { isSetUp } from '@/lib/lab/queries'
import { amendStory } from './seed/amend'
import { fillCases } from './seed/cases'
import { openFilling, type Filling } from './seed/context'
import { fillDays } from './seed/days'
import { batchesOf, layGround, tell, tellFinished } from './seed/finished'
import { markFilled } from './seed/people'
import { tellMorning } from './seed/morning'
import { fillPhotos } from './seed/photos'
import { answerFlags } from './seed/flags'
import { tellStations } from './seed/stations'
import { answerFormulas } from './seed/answers'

if (process.argv.includes('--people')) {
  for (const { name, roles, key } of demoPeople)
    console.log(`${name}, ${roles.join(' and ')}: ${key}@fernhollow.example`)
  console.log(
    `Each comes in with one press on the sign-in page; to sign a case the password is: ${demoPassword}`,
  )
} else {
  await main().catch((error: unknown) => {
    console.error(error instanceof Error ? error.message : String(error))
    process.exitCode = 1
  })
}

async function main(): Promise<void> {
  const begun = Date.now()
  const open = openFilling(databaseUrl('seed'))
  try {
    if (await isSetUp(open.db))
      throw new Error('There are people in this database already, so the demo is not filled into it.')
    await fill(open)
    console.log(`filled in ${Math.round((Date.now() - begun) / 1000)} s`)
  } finally {
    await open.close()
  }
}

async function fill(open: Omit<Filling, 'people'>): Promise<void> {
  const say = (what: string) => console.log(what)
  const ground = await layGround(open, say)
  const { filling, protocols } = ground
  const finished = await tellFinished(ground, say)
  const waiting = await tell(
    ground,
    {
      title: 'Light silicone cream SI80, long-term',
      formula: 'SI80',
      batches: await batchesOf(ground, 'SI80', 3, 3000, 390),
      protocol: protocols['three years'],
      startedDaysAgo: 380,
      untilDaysAgo: 0,
      isShared: false,
    },
    say,
  )
  await tell(
    ground,
    {
      title: 'Silicone cream SI82, half a year',
      formula: 'SI82',
      batches: await batchesOf(ground, 'SI82', 1, 4000, 186),
      protocol: protocols['half year'],
      startedDaysAgo: 182,
      untilDaysAgo: 0,
      today: (jar) => jar.temperatureC === 5,
      isShared: false,
    },
    say,
  )
  const apart = await tell(
    ground,
    {
      title: 'Silicone-free cream N86, half a year',
      formula: 'N86',
      batches: await batchesOf(ground, 'N86', 1, 4000, 88),
      protocol: protocols['half year stiff'],
      startedDaysAgo: 84,
      untilDaysAgo: 0,
      today: (jar) => jar.temperatureC === 5 || (jar.temperatureC === 25 && jar.asks === 'watch'),
      isShared: false,
    },
    say,
  )
  await tell(
    ground,
    {
      title: 'Lotion L1, screen',
      formula: 'L1',
      batches: await batchesOf(ground, 'L1', 1, 4000, 60),
      protocol: protocols['screen lotion'],
      startedDaysAgo: 56,
      untilDaysAgo: 0,
      // Week 5: one viscometer read high at every station.
      shiftedDaysAgo: 21,
      isShared: true,
    },
    say,
  )
  const second = await tell(
    ground,
    {
      title: 'Silicone cream SI82, second batch',
      formula: 'SI82',
      batches: await batchesOf(ground, 'SI82', 1, 4000, 25),
      protocol: protocols['screen cream'],
      startedDaysAgo: 21,
      untilDaysAgo: 0,
      isShared: false,
    },
    say,
  )
  const thawed = await tell(
    ground,
    {
      title: 'Lotion L1, freeze-thaw',
      formula: 'L1',
      batches: await batchesOf(ground, 'L1', 1, 3000, 12),
      protocol: protocols['freeze-thaw'],
      startedDaysAgo: 9,
      untilDaysAgo: 0,
      isShared: false,
    },
    say,
  )
  await tell(
    ground,
    {
      title: 'Lotion L1, texture and colour',
      formula: 'L1',
      batches: await batchesOf(ground, 'L1', 1, 2000, 48),
      protocol: protocols['feel'],
      startedDaysAgo: 44,
      untilDaysAgo: 0,
      isShared: false,
    },
    say,
  )
  await amendStory(filling, apart.id, apart.code)
  await tellStations(filling, ground.places, second.code)
  console.log('this morning')
  await tellMorning(filling, ground.places, { running: second.id, overdue: thawed.id })
  console.log('photos')
  await fillPhotos(filling, apart.id)
  console.log('questions, flags and cases')
  await answerFormulas(filling)
  await answerFlags(filling)
  await fillCases(filling, { finished, waiting })
  await fillDays(filling)
  await markFilled(filling)
}
