'use client'

import { Button } from '@/components/ui/button'
import { countWord } from '@/components/ui/count-word'
import { Dialog } from '@/components/ui/dialog'
import { useOutbox } from './use-outbox'

type Props = { count: number; isLeaving: boolean; onLeave: () => void; onClose: () => void }

/** Whoever signs out is told what would stay behind on this device, and for whom. */
export function UnsentDialog({ count, isLeaving, onLeave, onClose }: Props) {
  const { flush } = useOutbox()
  return (
    <Dialog
      isOpen
      density="bench"
      onClose={onClose}
      title={`${countWord(count, true)} ${count === 1 ? 'entry is' : 'entries are'} still only on this device`}
      sentence={`${count === 1 ? 'It stays' : 'They stay'} here, shown to nobody but you, until you sign in again on this device.`}
      acts={
        <>
          <Button density="bench" kind="danger" busy={isLeaving} onClick={onLeave}>
            Sign out, leave {count === 1 ? 'it' : 'them'} here
          </Button>
          <Button
            density="bench"
            kind="primary"
            onClick={() => {
              void flush()
              onClose()
            }}
          >
            Stay and send now
          </Button>
        </>
      }
    />
  )
}
