import { cycleBoard } from '@/lib/cycle/queries/board'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'bench.read',
  handler: ({ db, actor }) => cycleBoard(db, actor),
})
