import { read, write } from '@/lib/http/route'
import { changeLab } from '@/lib/lab/commands'
import { getLab } from '@/lib/lab/queries'
import { labToChange } from '@/lib/lab/schema'

export const GET = read({ permission: 'profile.own', handler: ({ db }) => getLab(db) })

export const PATCH = write({
  permission: 'lab.manage',
  input: labToChange,
  handler: ({ db, actor, input }) => changeLab(db, actor, input),
})
