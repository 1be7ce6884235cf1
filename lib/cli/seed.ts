import { demoPeople } from '@/fixtures/demo/people'
import { databaseUrl } from '@/lib/env'
import { demoPassword } from '@/lib/lab/rules'
import { isSetUp } from '@/lib/lab/queries'
import { fillCases } from './seed/cases'
import { openFilling, type Filling } from './seed/context'
import { fillFormulas, makeBatch } from './seed/making'
import { fillPeople, markFilled } from './seed/people'
import { fillPhotos } from './seed/photos'
import { fillPlaces, fillTemperatures } from './seed/places'
import { fillProtocols, tellStory, type Story } from './seed/studies'
import { answerFlags } from './seed/flags'

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
  console.log('people and places')
  const { people, clients } = await fillPeople(open)
  const filling: Filling = { ...open, people }
  const places = await fillPlaces(filling)
  await fillTemperatures(filling, places)
  console.log('formulas and protocols')
  const formulas = await fillFormulas(filling, clients)
  const protocols = await fillProtocols(filling)

  const tell = async (story: Omit<Story, 'clientId'>) => {
    const client = formulas[story.formula]!.client
    const told = await tellStory(filling, places, { ...story, clientId: clients[client] }, (done) =>
      console.log(`${story.title}: ${done} jars read`),
    )
    console.log(`${story.title}: told`)
    return told
  }
  const batchesOf = async (formula: string, count: number, sizeG: number, madeDaysAgo: number) => {
    const list = []
    for (let i = 0; i < count; i += 1)
      list.push(await makeBatch(filling, formulas, formula, sizeG, madeDaysAgo - i))
    return list
  }

  const finished = await tell({
    title: 'Body lotion L2, long-term',
    formula: 'L2',
    batches: await batchesOf('L2', 3, 3000, 780),
    protocol: protocols['two years'],
    startedDaysAgo: 770,
    untilDaysAgo: 0,
    isShared: true,
  })
  const waiting = await tell({
    title: 'Light silicone cream SI80, long-term',
    formula: 'SI80',
    batches: await batchesOf('SI80', 3, 3000, 390),
    protocol: protocols['three years'],
    startedDaysAgo: 380,
    untilDaysAgo: 0,
    isShared: false,
  })
  await tell({
    title: 'Silicone cream SI82, half a year',
    formula: 'SI82',
    batches: await batchesOf('SI82', 1, 4000, 186),
    protocol: protocols['half year'],
    startedDaysAgo: 182,
    untilDaysAgo: 0,
    today: (jar) => jar.temperatureC === 5,
    isShared: false,
  })
  const apart = await tell({
    title: 'Silicone-free cream N86, half a year',
    formula: 'N86',
    batches: await batchesOf('N86', 1, 4000, 88),
    protocol: protocols['half year stiff'],
    startedDaysAgo: 84,
    untilDaysAgo: 0,
    today: (jar) => jar.temperatureC === 5 || (jar.temperatureC === 25 && jar.asks === 'watch'),
    isShared: false,
  })
  await tell({
    title: 'Lotion L1, screen',
    formula: 'L1',
    batches: await batchesOf('L1', 1, 4000, 60),
    protocol: protocols['screen lotion'],
    startedDaysAgo: 56,
    untilDaysAgo: 0,
    // Week 5: one viscometer read high at every station.
    shiftedDaysAgo: 21,
    isShared: true,
  })
  await tell({
    title: 'Silicone cream SI82, second batch',
    formula: 'SI82',
    batches: await batchesOf('SI82', 1, 4000, 25),
    protocol: protocols['screen cream'],
    startedDaysAgo: 21,
    untilDaysAgo: 0,
    isShared: false,
  })
  console.log('photos')
  await fillPhotos(filling, apart.id)
  console.log('flags and cases')
  await answerFlags(filling)
  await fillCases(filling, { finished, waiting })
  await markFilled(filling)
}
