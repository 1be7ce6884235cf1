'use client'

import { useState } from 'react'
import type { OutboxItem } from '@/components/device/outbox-item'
import type { BatchOutbox } from './use-batch-outbox'

/** Under a bracket: what of this batch is still only on this tablet. Nothing is shown while all is on the server. */
export function BatchTray({ outbox }: { outbox: BatchOutbox }) {
  const { kept, waiting, isOnline, flush } = outbox
  const refused = kept.filter((item) => item.refusal !== null)
  if (isOnline && kept.length === 0) return null
  return (
    <div data-screen-only className="mt-3 flex flex-col gap-3">
      {waiting > 0 || !isOnline ? (
        <button
          type="button"
          onClick={() => void flush()}
          className="flex min-h-16 items-center justify-between gap-4 rounded bg-ink px-4 text-left text-onink"
        >
          <span role="status" className="text-18">
            <b>{isOnline ? 'Sending' : 'No network'}</b>,{' '}
            {waiting === 0
              ? 'entries wait here'
              : `${waiting} ${waiting === 1 ? 'entry is' : 'entries are'} kept on this tablet`}
          </span>
          <span className="text-17 underline underline-offset-4">Send now</span>
        </button>
      ) : null}
      {refused.map((item) => (
        <Refused key={item.id} item={item} onDrop={() => void outbox.drop(item)} />
      ))}
    </div>
  )
}

function Refused({ item, onDrop }: { item: OutboxItem; onDrop: () => void }) {
  const [isAsked, setIsAsked] = useState(false)
  return (
    <div
      role="alert"
      className="flex flex-wrap items-center justify-between gap-4 border-b-[3px] border-alarm pb-2"
    >
      <p className="text-17">
        <b>{item.about.label} was not taken.</b> {item.refusal?.sentence} Enter it again, then put this one
        away.
      </p>
      <button
        type="button"
        onClick={() => (isAsked ? onDrop() : setIsAsked(true))}
        className="min-h-16 rounded border-2 border-alarm px-4 text-17 text-alarm"
      >
        {isAsked ? 'Yes, put it away' : 'Put it away'}
      </button>
    </div>
  )
}
