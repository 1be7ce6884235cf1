'use client'

import { useState } from 'react'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { countWord } from '@/components/ui/count-word'
import { fetcher } from '@/lib/http/fetcher'
import { WaitingEntry } from './waiting-entry'
import type { OutboxOnScreen } from './use-outbox'

/** Everything that is still only on this device, the oldest first, and what can be done with each. */
export function OutboxDialog({ outbox, onClose }: { outbox: OutboxOnScreen; onClose: () => void }) {
  const { items, isOnline, isSignedOut, flush } = outbox
  const [isBusy, setBusy] = useState(false)
  const refused = items.filter((item) => item.refusal !== null).length

  async function sendNow() {
    setBusy(true)
    // Who was signed out is asked for the password first, and everything goes out after it.
    if (isSignedOut)
      await keep(() => fetcher('/api/session'), { what: `${items.length} entries` }).catch(() => undefined)
    await flush()
    setBusy(false)
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      width={720}
      density="bench"
      title={items.length === 0 ? 'Everything is on the server' : titleOf(items.length, refused)}
      sentence={sentenceOf(isOnline, isSignedOut, items.length, refused)}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Close
          </Button>
          {items.length > refused || isSignedOut ? (
            <Button density="bench" kind="primary" busy={isBusy} onClick={() => void sendNow()}>
              {isSignedOut ? 'Sign in and send' : 'Send now'}
            </Button>
          ) : null}
        </>
      }
    >
      {items.length > 0 ? (
        <ol>
          {items.map((item) => (
            <WaitingEntry key={item.id} item={item} outbox={outbox} onLeave={onClose} />
          ))}
        </ol>
      ) : null}
    </Dialog>
  )
}

function titleOf(count: number, refused: number): string {
  if (refused === count)
    return `${countWord(count, true)} ${count === 1 ? 'entry was' : 'entries were'} not taken`
  return `${countWord(count, true)} ${count === 1 ? 'entry is' : 'entries are'} only on this tablet`
}

function sentenceOf(isOnline: boolean, isSignedOut: boolean, count: number, refused: number): string {
  if (count === 0) return 'Nothing waits here.'
  if (refused === count && !isSignedOut)
    return `${count === 1 ? 'It stays' : 'They stay'} on this tablet until you have said what becomes of ${count === 1 ? 'it' : 'them'}.`
  const goes = count === 1 ? 'It goes out' : 'They go out'
  if (isSignedOut) return `You were signed out. ${goes} once you have signed in again.`
  if (!isOnline)
    return count === 1
      ? 'It goes out by itself, once, when the network is back.'
      : 'They go out by themselves, once each and in this order, when the network is back.'
  return count === 1 ? 'It goes out once.' : 'They go out once each and in this order.'
}
