'use client'

import { useState } from 'react'
import { clockTime } from './clock-time'
import { OutboxDialog } from './outbox-dialog'
import { useOutbox, type OutboxOnScreen } from './use-outbox'

/**
 * The bracket under what is still only on this device; nothing is shown while all is on the server. Pressed, it lists
 * each entry.
 */
export function Tray({ outbox }: { outbox: OutboxOnScreen }) {
  const [isOpen, setOpen] = useState(false)
  const { items, isOnline, isSignedOut, asOf } = outbox
  const refused = items.filter((item) => item.refusal !== null).length
  if (isOnline && !isSignedOut && items.length === 0 && !isOpen) return null
  const head = isSignedOut
    ? 'Signed out'
    : !isOnline
      ? 'No network'
      : refused > 0
        ? 'Not taken'
        : items.length > 0
          ? 'Sending'
          : 'All sent'
  const count = countText(items.length, refused, isOnline ? null : asOf)
  return (
    <>
      <button
        type="button"
        data-screen-only
        onClick={() => setOpen(true)}
        aria-label={`${head}. ${count}. Show what waits.`}
        className="peer flex min-h-16 items-center gap-4 rounded bg-ink px-4 text-left text-onink"
      >
        {items.length > 0 ? (
          <span
            data-bracket
            aria-hidden
            className="flex items-end gap-1 border-x-2 border-b-2 border-onink px-1.5 pb-1"
          >
            {items.slice(0, 5).map((item) => (
              <span
                key={item.id}
                className={`h-5 w-3.5 border-2 border-t-4 border-onink ${item.refusal ? 'bg-onink' : ''}`}
              />
            ))}
          </span>
        ) : null}
        <span className="leading-tight" role="status">
          <b className="block text-18">{head}</b>
          <span className="text-17">
            {count.replace(onTablet, '')}
            {count.endsWith(onTablet) ? <span className="max-sm:hidden">{onTablet}</span> : null}
          </span>
        </span>
      </button>
      {isOpen ? <OutboxDialog outbox={outbox} onClose={() => setOpen(false)} /> : null}
    </>
  )
}

/** For pages of the Desk, which have no outbox of their own. */
export function ShellTray() {
  const outbox = useOutbox()
  return (
    <div className="mt-3 empty:hidden">
      <Tray outbox={outbox} />
    </div>
  )
}

/** Left out on a phone, where the place is short. */
const onTablet = ' on this tablet'

function countText(all: number, refused: number, asOf: string | null): string {
  if (refused > 0) return `${refused} to look at, ${all} kept here`
  if (all > 0) return `${all} kept${onTablet}`
  return asOf ? `as of ${clockTime(asOf)}` : 'nothing waits here'
}
