import { logCycleStep } from '@/lib/cycle/commands/log-half'
import { listCycleSteps } from '@/lib/cycle/queries/list'
import { cycleFilter, cycleStep } from '@/lib/cycle/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({
  permission: 'study.read',
  query: cycleFilter,
  handler: ({ db, actor, query }) => listCycleSteps(db, actor, query.studyStation),
})

export const POST = write({
  permission: 'cycle.log',
  input: cycleStep,
  handler: ({ db, actor, input, now }) => logCycleStep(db, actor, input, now),
})
