import type { Actor } from '@/lib/auth/actor'
import { createDb, createPool, type Db, type Trx } from '@/lib/db/client'
import { transact } from '@/lib/db/transact'
import type { DemoPerson } from '@/fixtures/demo/people'
import { noiseFrom, type Noise } from './noise'

const dayMs = 24 * 3600 * 1000

/**
 * What filling needs: the seeding role's connection, the people as actors, one noise, and `act`, which runs a
 * command as somebody at some moment in the past. The trail marks each such row as written under a shifted clock.
 */
export type Filling = {
  db: Db
  noise: Noise
  /** The moment of filling; all of the demo's times count back from it. */
  now: Date
  people: Record<DemoPerson, Actor>
  act: <T>(who: Actor, at: Date, work: (trx: Trx, now: string) => Promise<T>, reason?: string) => Promise<T>
  close: () => Promise<void>
}

export function openFilling(seedUrl: string): Omit<Filling, 'people'> {
  const pool = createPool(seedUrl, 3)
  const db = createDb(() => pool)
  const now = new Date()
  return {
    db,
    noise: noiseFrom(20261201),
    now,
    act: (who, at, work, reason) =>
      transact(db, who, { shiftedTo: at > now ? now : at, requestId: 'demo', reason }, work),
    close: () => pool.end(),
  }
}

/** So many days before today, at this hour of the lab's zone (close enough to it: UTC plus one). */
export function daysAgo({ now }: { now: Date }, days: number, hour = 9, minute = 0): Date {
  const at = new Date(now.getTime() - days * dayMs)
  at.setUTCHours(hour - 1, minute, 0, 0)
  return at > now ? new Date(now.getTime() - 60_000) : at
}
