import { carryOver } from './carry-over'
import { keepDrafts, type Drafts } from './drafts'
import { makeOutbox, type Outbox } from './outbox'
import { openStore, type Store } from './store'
import { speakToTabs } from './tabs'

/** What this device keeps and sends for one person. */
export type Device = { personId: string; store: Store; drafts: Drafts; outbox: Outbox }

const devices = new Map<string, Device>()

/** In the browser only. Made once for a page; the outbox goes on sending while one moves about. */
export function deviceOf(personId: string): Device {
  const known = devices.get(personId)
  if (known) return known
  const store = openStore(personId)
  const tabs = speakToTabs(personId)
  const drafts = keepDrafts(store, tabs)
  const device = { personId, store, drafts, outbox: makeOutbox(personId, store, drafts, tabs) }
  devices.set(personId, device)
  void carryOver(device).then(() => device.outbox.flush())
  return device
}
