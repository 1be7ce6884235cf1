import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'

export type OpenNote = {
  id: string
  text: string
  writtenAt: string
  by: string
  initials: string
  readBy: string | null
  readAt: string | null
}

/** Notes that nobody has read yet, and those read on this day; the oldest first. */
export async function listHandoverNotes(db: Db, day: string, zone: string): Promise<OpenNote[]> {
  const { rows } = await sql<OpenNote>`
    select n.id, n.text, n.written_at, author.name as by, author.initials, reader.name as read_by, r.read_at
    from handover_note n
      join person author on author.id = n.written_by
      left join handover_read r on r.handover_note_id = n.id
      left join person reader on reader.id = r.read_by
    where r.id is null or (r.read_at at time zone ${zone})::date = ${day}::date
    order by n.written_at, n.id
    limit 50
  `.execute(db)
  return rows
}
