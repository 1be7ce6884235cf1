import { ClientError } from '@/lib/http/fetcher'

/** What could not be sent because its author was signed out meanwhile. */
export type Unsent = {
  /** Names it: "answer to flag 36". */
  what: string
  /** What was typed, for the eye. */
  text?: string
}

export type Waiting = Unsent & { signedIn: () => Promise<void>; leave: () => void }

let waiting: Waiting | null = null
const listeners = new Set<() => void>()

/**
 * Sends, and when the session has ended asks for the password in place and sends once more; the dialog for
 * it stands in the shell. Whoever leaves the dialog gets the refusal, and the text is where it was typed.
 */
export async function keep<T>(act: () => Promise<T>, unsent: Unsent): Promise<T> {
  try {
    return await act()
  } catch (thrown) {
    if (!isSignedOut(thrown) || listeners.size === 0) throw thrown
    return new Promise<T>((resolve, reject) => {
      publish({
        ...unsent,
        signedIn: async () => {
          const answer = await act()
          publish(null)
          resolve(answer)
        },
        leave: () => {
          publish(null)
          reject(thrown)
        },
      })
    })
  }
}

export function isSignedOut(error: unknown): boolean {
  return error instanceof ClientError && error.status === 401
}

export function waitingNow(): Waiting | null {
  return waiting
}

export function listenToWaiting(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

function publish(next: Waiting | null) {
  waiting = next
  for (const listener of listeners) listener()
}
