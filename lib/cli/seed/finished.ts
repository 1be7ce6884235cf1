import type { DemoClient } from '@/fixtures/demo/people'
import type { Filling } from './context'
import { fillFormulas, makeBatch, type Batch, type Formulas } from './making'
import { fillPeople } from './people'
import { fillPlaces, fillTemperatures, type Places } from './places'
import { fillProtocols, tellStory, type Protocols, type Story } from './studies'

export type Ground = {
  filling: Filling
  places: Places
  formulas: Formulas
  protocols: Protocols
  clients: Record<DemoClient, string>
}

/** What every story of the demo stands on: people, stations with their logs, formulas and protocols. */
export async function layGround(open: Omit<Filling, 'people'>, say: (what: string) => void): Promise<Ground> {
  say('people and places')
  const { people, clients } = await fillPeople(open)
  const filling: Filling = { ...open, people }
  const places = await fillPlaces(filling)
  await fillTemperatures(filling, places)
  say('formulas and protocols')
  const formulas = await fillFormulas(filling, clients)
  const protocols = await fillProtocols(filling)
  return { filling, places, formulas, protocols, clients }
}

export async function tell(
  { filling, places, formulas, clients }: Ground,
  story: Omit<Story, 'clientId'>,
  say: (what: string) => void,
): Promise<{ id: string; code: string }> {
  const { client } = formulas[story.formula]!
  const told = await tellStory(filling, places, { ...story, clientId: clients[client] }, (done) =>
    say(`${story.title}: ${done} jars read`),
  )
  say(`${story.title}: told`)
  return told
}

export async function batchesOf(
  { filling, formulas }: Ground,
  formula: string,
  count: number,
  sizeG: number,
  madeDaysAgo: number,
): Promise<Batch[]> {
  const list = []
  for (let i = 0; i < count; i += 1)
    list.push(await makeBatch(filling, formulas, formula, sizeG, madeDaysAgo - i))
  return list
}

/** The study that was read to its end; its case is signed (seed/cases.ts). */
export async function tellFinished(ground: Ground, say: (what: string) => void) {
  return tell(
    ground,
    {
      title: 'Body lotion L2, long-term',
      formula: 'L2',
      batches: await batchesOf(ground, 'L2', 3, 3000, 780),
      protocol: ground.protocols['two years'],
      startedDaysAgo: 770,
      untilDaysAgo: 0,
      isShared: true,
    },
    say,
  )
}
