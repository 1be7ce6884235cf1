import { useState } from 'react'
import { ClientError } from '@/lib/http/fetcher'
import type { NewEntry } from './use-batch-outbox'
import type { BatchWork } from './work'

/** One entry at the batch: kept or sent, its refusal beside what was typed. */
export function useEntry(work: BatchWork) {
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)

  async function keep(item: NewEntry): Promise<boolean> {
    setRefusal(null)
    setIsSending(true)
    try {
      await work.outbox.keep({ ...item, body: { ...item.body, ...work.claim() } })
      return true
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
      return false
    } finally {
      setIsSending(false)
    }
  }

  const fields = refusal?.fields ?? {}
  const isAtPlace = refusal?.status === 422 && Object.keys(fields).some((field) => field !== 'claimedAt')
  return { keep, isSending, fields, refusal: isAtPlace ? null : refusal }
}
