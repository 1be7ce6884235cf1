'use client'

import { useRouter } from 'next/navigation'
import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { dayKeys } from '@/lib/day/keys'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'

type Props = { day: string; entryIds: string[]; isOwn: boolean }

/** Marks what is on the page as seen; what came meanwhile is refused, so that nothing is marked unseen. */
export function ReviewForm({ day, entryIds, isOwn }: Props) {
  const router = useRouter()
  const [id] = useState(newId)
  const [remark, setRemark] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)

  async function review(event: FormEvent) {
    event.preventDefault()
    setBusy(true)
    setError(null)
    try {
      await send(dayKeys.reviews(day), 'POST', { id, entryIds, remark })
      router.refresh()
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  return (
    <form onSubmit={review} data-screen-only className="mt-4 flex flex-wrap items-end gap-4">
      <Field
        label="Remark"
        wrap="w-full max-w-[460px]"
        value={remark}
        onText={setRemark}
        hint="Left empty where there is none."
      />
      <Button
        type="submit"
        kind="primary"
        busy={isBusy}
        why={isOwn ? 'You have entered data of this day yourself; another person reviews it.' : undefined}
      >
        Mark as reviewed
      </Button>
      <ErrorNote error={error} />
    </form>
  )
}
