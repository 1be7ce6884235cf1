import * as z from '@/lib/http/zod'

const name = z.string().trim().min(1, 'Name the client.').max(120)

export const clientId = z.object({ id: z.uuid() })
export const clientToAdd = z.object({ id: z.uuid(), name })
export const clientToRename = z.object({ version: z.number().int(), name })

export type ClientToAdd = z.infer<typeof clientToAdd>
export type ClientToRename = z.infer<typeof clientToRename>
