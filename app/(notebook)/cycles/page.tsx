import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { CycleBoard } from '@/components/cycle/cycle-board'
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
      <CycleBoard mayLog={may(actor, 'cycle.log')} />
    </SWRConfig>
  )
}
