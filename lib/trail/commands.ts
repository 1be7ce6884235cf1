import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'

export type TrailEvent = {
  event: string
  table?: string | undefined
  id?: string | undefined
  detail?: Record<string, unknown> | undefined
  reason?: string | undefined
}

/** For what happens without a row: a sign-in, an export, a refused signature. The actor is the transaction's. */
export async function recordEvent(trx: Trx, event: TrailEvent): Promise<void> {
  await sql`
    select record_event(${event.event}, ${event.table ?? null}, ${event.id ?? null},
      ${event.detail ? JSON.stringify(event.detail) : null}::jsonb, ${event.reason ?? null})
  `.execute(trx)
}
