import type { Actor } from '@/lib/auth/actor'
import { may } from '@/lib/auth/permissions'

/** What this person may do with a flag; what would be refused is not shown. */
export type FlagRights = { mayComment: boolean; mayAnswer: boolean; mayCloseOut: boolean }

export function flagRights(actor: Pick<Actor, 'roles'>): FlagRights {
  return {
    mayComment: may(actor, 'flag.comment'),
    mayAnswer: may(actor, 'flag.answer'),
    mayCloseOut: may(actor, 'flag.close-out'),
  }
}
