'use client'

import { useState } from 'react'
import { keep } from '@/components/session/keep'
import { ClientError, send } from '@/lib/http/fetcher'

type Act = { url: string; body: object; what: string; text: string; onDone: () => void }

/** Sends what a person wrote about a flag; what is refused stays where it was typed. */
export function useFlagAct() {
  const [error, setError] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)

  /** Gives back the refusal, if there was one. */
  async function act({ url, body, what, text, onDone }: Act): Promise<ClientError | null> {
    if (isSending) return null
    setError(null)
    setIsSending(true)
    try {
      await keep(() => send(url, 'POST', body), { what, text })
      onDone()
      return null
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setError(thrown)
      return thrown
    } finally {
      setIsSending(false)
    }
  }

  const isAtPlace = error?.status === 422 && Object.keys(error.fields).length > 0
  return { act, isSending, fields: error?.fields ?? {}, error: isAtPlace ? null : error }
}
