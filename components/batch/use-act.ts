'use client'

import { useState } from 'react'
import { ClientError, send } from '@/lib/http/fetcher'

/** One act on the batch: sends it, keeps the refusal beside what was typed. */
export function useAct(url: string, onDone: () => void) {
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)

  async function act(body: unknown) {
    setRefusal(null)
    setIsSending(true)
    try {
      await send(url, 'POST', body)
      onDone()
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    } finally {
      setIsSending(false)
    }
  }

  const isAtPlace = refusal?.status === 422 && Object.keys(refusal.fields).length > 0
  return { act, isSending, fields: refusal?.fields ?? {}, refusal: isAtPlace ? null : refusal }
}
