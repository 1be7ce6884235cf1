import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { CycleBoard } from '@/components/cycle/cycle-board'
import type { Actor } from '@/lib/auth/actor'
import { may } from '@/lib/auth/permissions'
import { cycleBoard } from '@/lib/cycle/queries/board'
import { cycleKeys } from '@/lib/cycle/keys'
import { page } from '@/lib/http/page'

export const permission = 'bench.read'
export const metadata: Metadata = { title: 'Freeze-thaw' }

export default async function CyclesPage() {
  const { actor, db } = await page(permission)
  const board = await cycleBoard(db, actor)
  return (
    <SWRConfig value={{ fallback: { [cycleKeys.board]: board } }}>
      <CycleBoard person={may(actor, 'cycle.log') ? personOf(actor) : null} />
    </SWRConfig>
  )
}

function personOf({ personId, roles }: Actor) {
  return { id: personId, isFormulator: roles.includes('formulator') }
}
