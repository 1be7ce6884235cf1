import { demoClients, demoLab, demoPeople, type DemoClient, type DemoPerson } from '@/fixtures/demo/people'
import { systemActor, type Actor } from '@/lib/auth/actor'
import { addClient } from '@/lib/client/commands'
import { newId } from '@/lib/db/id'
import { demoPassword } from '@/lib/lab/rules'
import { setPassword } from '@/lib/session/commands'
import { daysAgo, type Filling } from './context'

/** Lab, clients and people. They are marked as demo people, which is what one-click sign-in asks for. */
export async function fillPeople(filling: Omit<Filling, 'people'>) {
  const begun = daysAgo(filling, 800)
  const system = systemActor('demo')
  return filling.act(system, begun, async (trx) => {
    await trx
      .insertInto('lab')
      .values({ id: newId(), ...demoLab })
      .execute()
    const clients = {} as Record<DemoClient, string>
    for (const [key, name] of Object.entries(demoClients)) {
      clients[key as DemoClient] = newId()
      await addClient(trx, system, { id: clients[key as DemoClient], name })
    }
    const people = {} as Record<DemoPerson, Actor>
    for (const { key, initials, name, roles, client } of demoPeople) {
      const id = newId()
      const email = `${key}@fernhollow.example`
      const clientId = client ? clients[client] : null
      await trx
        .insertInto('person')
        .values({ id, email, name, initials, roles: [...roles], clientId, isDemo: true })
        .execute()
      await setPassword(trx, id, demoPassword)
      people[key] = {
        personId: id,
        name,
        initials,
        email,
        roles: [...roles],
        clientId,
        sessionId: '',
        requestId: 'demo',
        isDemo: true,
      }
    }
    return { people, clients }
  })
}

/** The mark that one-click sign-in and the mail page ask for; set last, when everything stands. */
export async function markFilled(filling: Filling): Promise<void> {
  await filling.act(systemActor('demo'), filling.now, (trx) =>
    trx.updateTable('lab').set({ demoFilledAt: filling.now.toISOString() }).execute(),
  )
}
