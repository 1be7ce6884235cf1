'use client'

import { useState } from 'react'
import { Side } from '@/components/bench/answers'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { atNewVersion, confirmed, decided, mineOf, theirsOf } from './conflict'
import { clockTime } from './clock-time'
import { useDevice } from './device-context'
import type { OutboxItem } from './outbox-item'
import type { OutboxOnScreen } from './use-outbox'

type Props = { item: OutboxItem; outbox: OutboxOnScreen; onLeave: () => void }

/** One entry: what it is, when it was typed, how far it is, and what its author can do where it was not taken. */
export function WaitingEntry({ item, outbox, onLeave }: Props) {
  const percent = outbox.sending[item.id]
  const state = item.refusal
    ? 'not taken'
    : percent === undefined
      ? 'waiting'
      : item.file
        ? `sending, ${percent} %`
        : 'sending'
  return (
    <li className="border-b border-hair py-3">
      <p className="flex flex-wrap items-baseline justify-between gap-x-6">
        <b className="text-20">{item.about.label}</b>
        <span className={item.refusal ? 'font-650 text-alarm' : 'text-soft'}>
          typed {clockTime(item.keptAt)}, {state}
        </span>
      </p>
      {item.refusal ? (
        <NotTaken item={item} outbox={outbox} onLeave={onLeave} />
      ) : item.about.what ? (
        <p className="text-17 text-soft">{item.about.what}</p>
      ) : null}
    </li>
  )
}

function NotTaken({ item, outbox, onLeave }: Props) {
  const device = useDevice()
  const [count, setCount] = useState<'mine' | 'theirs'>('mine')
  const [reason, setReason] = useState('')
  const [isAsked, setAsked] = useState(false)
  const refusal = item.refusal!
  const theirs = theirsOf(refusal)
  const isBetweenTwo = refusal.code === 'already read'
  const moved = refusal.code === 'stale' ? atNewVersion(item) : null

  async function takeBack() {
    if (item.draft) device?.drafts.change(item.draft.key, () => item.draft!.value)
    await outbox.drop(item)
    onLeave()
    goTo(item.about.href ?? '/')
  }

  return (
    <div className="mt-2 flex flex-col gap-3">
      {(Object.values(refusal.fields).length > 0 ? Object.values(refusal.fields) : [refusal.sentence]).map(
        (sentence) => (
          <p key={sentence} className="text-18">
            {sentence}
          </p>
        ),
      )}
      {isBetweenTwo && theirs ? (
        <>
          <div className="grid gap-3 sm:grid-cols-2" role="radiogroup" aria-label="Which counts">
            <Side
              name="Yours, kept here"
              lines={mineOf(item)}
              isPicked={count === 'mine'}
              onPick={() => setCount('mine')}
            />
            <Side
              name={`${theirs.by}, on record`}
              lines={theirs.lines}
              isPicked={count === 'theirs'}
              onPick={() => setCount('theirs')}
            />
          </div>
          <Field label="Why this one counts" density="bench" value={reason} onText={setReason} />
        </>
      ) : (
        <dl className="grid gap-x-6 gap-y-1 sm:grid-cols-2">
          <Value name="Yours, kept here" lines={mineOf(item)} />
          <Value
            name={theirs ? `${theirs.by}, on record` : 'On record'}
            lines={theirs ? theirs.lines : ['nothing of this entry']}
          />
        </dl>
      )}
      <p className="flex flex-wrap items-start gap-[var(--control-gap)]">
        {isBetweenTwo ? (
          <Button
            density="bench"
            kind="primary"
            why={reason.trim() === '' ? 'Say why first.' : undefined}
            onClick={() => void outbox.sendAgain(item, { body: decided(item, count, reason) })}
          >
            {count === 'mine' ? 'Count mine, keep both' : 'Count theirs, keep both'}
          </Button>
        ) : null}
        {refusal.code === 'confirm' ? (
          <Button
            density="bench"
            kind="primary"
            onClick={() => void outbox.sendAgain(item, { body: confirmed(item) })}
          >
            It is so, send it
          </Button>
        ) : null}
        {moved ? (
          <Button density="bench" onClick={() => void outbox.sendAgain(item, { body: moved })}>
            Send mine all the same
          </Button>
        ) : null}
        {item.draft && item.about.href ? (
          <Button density="bench" onClick={() => void takeBack()}>
            Back into the form
          </Button>
        ) : null}
        {isBetweenTwo || refusal.code === 'confirm' || moved ? null : (
          <Button density="bench" onClick={() => void outbox.sendAgain(item)}>
            Try once more
          </Button>
        )}
        <Button
          density="bench"
          kind={isAsked ? 'danger-asked' : 'danger'}
          onClick={() => (isAsked ? void outbox.drop(item) : setAsked(true))}
        >
          {isAsked ? 'Yes, put it aside for good' : 'Put it aside'}
        </Button>
      </p>
    </div>
  )
}

function Value({ name, lines }: { name: string; lines: string[] }) {
  return (
    <div>
      <dt className="text-17 text-soft">{name}</dt>
      {lines.map((line, at) => (
        <dd key={at} className="text-18">
          {line}
        </dd>
      ))}
    </div>
  )
}

/** Within the Bench without a navigation, which would need the network. */
function goTo(address: string): void {
  const isBench = [address, window.location.pathname].every((one) => /^\/bench(\/|$)/.test(one))
  if (isBench) window.history.pushState(null, '', address)
  else window.location.assign(address)
}
