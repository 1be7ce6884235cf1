import type { ClientError } from '@/lib/http/fetcher'

export type Outcome<T> = { how: 'sent'; answer: T } | { how: 'kept' }

type Waiter = {
  isPatient: boolean
  resolve: (outcome: Outcome<unknown>) => void
  reject: (error: ClientError) => void
  timer: ReturnType<typeof setTimeout> | undefined
}

/** Nobody stands at a jar for longer than this until the server has answered. */
const patienceMs = 6_000

/** Who waits on this page for what becomes of an entry. */
export function makeWaiting(onChange: (awaited: string[]) => void) {
  const waiters = new Map<string, Waiter>()
  const tell = () => onChange([...waiters].flatMap(([id, { isPatient }]) => (isPatient ? [] : [id])))

  function take(id: string): Waiter | undefined {
    const waiter = waiters.get(id)
    if (!waiter) return undefined
    waiters.delete(id)
    clearTimeout(waiter.timer)
    tell()
    return waiter
  }

  return {
    /** A file takes as long as it takes. */
    await<T>(id: string, isPatient: boolean): Promise<Outcome<T>> {
      return new Promise((resolve, reject) => {
        const timer = isPatient ? undefined : setTimeout(() => take(id)?.resolve({ how: 'kept' }), patienceMs)
        waiters.set(id, { isPatient, resolve: resolve as Waiter['resolve'], reject, timer })
        tell()
      })
    },

    isAwaited: (id: string) => waiters.has(id),
    holdOn: (id: string) => clearTimeout(waiters.get(id)?.timer),
    drop: (id: string) => void take(id),
    settle: (id: string, outcome: Outcome<unknown>) => take(id)?.resolve(outcome),
    refuse: (id: string, error: ClientError) => take(id)?.reject(error),

    settleAll(isMeant: (id: string) => boolean): void {
      for (const id of [...waiters.keys()]) if (isMeant(id)) take(id)?.resolve({ how: 'kept' })
    },
  }
}
