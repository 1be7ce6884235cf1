import { read } from '@/lib/http/route'
import { listMails } from '@/lib/mail/inbox'

export const GET = read({ permission: 'mail.read', handler: ({ db }) => listMails(db) })
