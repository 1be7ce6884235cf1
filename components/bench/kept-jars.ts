import { makeOutbox, type Waiting } from '@/components/ui/outbox'
import { useOutbox } from '@/components/ui/use-outbox'
import { send } from '@/lib/http/fetcher'

/** A jar's entry; where it was refused, its jar must be opened again. */
export type KeptJar = Waiting & { url: string; pullJarId: string; jarName: string; code: string }

/** One entry a jar: the readings' own ids make a repeat harmless. */
export const jarOutbox = makeOutbox<KeptJar>('stillstand.outbox', ({ url }, body) => send(url, 'POST', body))

export const useJarOutbox = (personId: string, onSent: () => void) => useOutbox(jarOutbox, personId, onSent)
