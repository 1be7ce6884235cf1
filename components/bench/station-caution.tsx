'use client'

import { useKept } from '@/components/device/use-kept'
import { useReadDrafts } from '@/components/device/use-read-drafts'
import { Button } from '@/components/ui/button'

/** How many stations' days the device remembers as read; the oldest go. */
const kept = 40

type Props = { stationId: string; day: string; caution: string }

/** What to mind at a station: large until this person has read it that day on this tablet, then in the quiet line. */
export function useCaution({ stationId, day, caution }: Props) {
  const [{ read }, change] = useKept<{ read: string[] }>('cautions', { read: [] })
  // Until the device was read, nobody knows whether it is new; a line that jumped would be in the way.
  const isKnown = useReadDrafts() !== null
  const key = `${stationId} ${day}`
  return {
    isNew: isKnown && caution !== '' && !read.includes(key),
    noteRead: () => change((now) => ({ read: [...now.read.filter((one) => one !== key), key].slice(-kept) })),
  }
}

export function LargeCaution({ caution, onRead }: { caution: string; onRead: () => void }) {
  return (
    <div role="note" className="flex flex-wrap items-center gap-3 border-l-[5px] border-ink py-1 pl-3">
      <p className="min-w-0 flex-1 text-24 font-700 leading-tight">{caution}</p>
      <Button density="bench" onClick={onRead}>
        Seen
      </Button>
    </div>
  )
}
