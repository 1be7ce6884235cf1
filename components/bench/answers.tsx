'use client'

import { useState } from 'react'
import type { BenchPerson } from '@/components/device/last-person'
import type { DraftEntry } from '@/components/bench/draft'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { Field } from '@/components/ui/field'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { ClientError } from '@/lib/http/fetcher'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'
import { writtenAs } from '@/lib/bench/rules'
import { shownValue } from '@/lib/study/rules/words'

/** What the server gives when someone else has read the jar: lib/pull/rules/refusals.ts. */
export type AlreadyRead = {
  version: number
  by: { name: string; initials: string }
  at: string
  readings: {
    id: string
    attribute: AttributeKey
    replicate: number
    value: number | null
    word: string | null
    typed: string
  }[]
  comparisons: { attribute: AttributeKey; difference: number; scatter: number; agree: boolean }[]
}

/** What the person said when the server asked. */
export type Answer = {
  confirmed?: string[]
  leaveOut?: string[]
  resolution?: { count: 'mine' | 'theirs'; reason: string }
  version?: number
}

/** Without network: what the server would ask about fields that were left open. */
export function askLocally(missing: { attribute: string; label: string }[]): ClientError {
  const sentences = missing.map(({ attribute, label }): [string, string] => [
    `missing.${attribute}`,
    `${label} is not read yet. Read it, or say that it is left out.`,
  ])
  const [first] = sentences
  return new ClientError({
    status: 409,
    code: 'confirm',
    sentence: first?.[1] ?? 'A field is open.',
    fields: Object.fromEntries(sentences),
  })
}

type AskProps = { refusal: ClientError; onConfirm: () => void; onAgain: () => void; isBusy: boolean }

/** A number that may be, but is unlikely: it is taken as a doubt, or typed again. */
export function AskAgain({ refusal, onConfirm, onAgain, isBusy }: AskProps) {
  const sentences = [...new Set(Object.values(refusal.fields))]
  const asked = Object.keys(refusal.fields)
  const isOnlyOpen = asked.length > 0 && asked.every((key) => key.startsWith('missing.'))
  return (
    <Dialog
      isOpen
      onClose={onAgain}
      title={isOnlyOpen ? 'Not everything is read' : 'Is it so?'}
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onAgain}>
            {isOnlyOpen ? 'Read it' : 'Type again'}
          </Button>
          <Button density="bench" kind="primary" busy={isBusy} onClick={onConfirm}>
            {isOnlyOpen ? 'Leave it out, keep the rest' : 'It is so, keep it'}
          </Button>
        </>
      }
    >
      {(sentences.length > 0 ? sentences : [refusal.sentence]).map((sentence) => (
        <p key={sentence} className="text-20">
          {sentence}
        </p>
      ))}
      {isOnlyOpen ? null : (
        <p className="text-17 text-soft">
          An unlikely value is kept as a doubt: it takes no part until a repeat settles it or someone sets the
          doubt aside.
        </p>
      )}
    </Dialog>
  )
}

type TwoProps = {
  jar: BenchJarPage
  person: BenchPerson
  theirs: AlreadyRead
  mine: DraftEntry[]
  isBusy: boolean
  onDecide: (resolution: { count: 'mine' | 'theirs'; reason: string }) => void
  onClose: () => void
}

/** Two people, one jar: both readings stay on record, and one says which counts, and why. */
export function TwoPeople({ jar, person, theirs, mine, isBusy, onDecide, onClose }: TwoProps) {
  const [count, setCount] = useState<'mine' | 'theirs'>('mine')
  const [reason, setReason] = useState('')
  const apart = theirs.comparisons[0]
  // A distance between words of a scale is a number, not a word.
  const distance = (key: string, size: number) =>
    shownValue({ ...writtenAs(jar.fields, key), words: null }, size)
  return (
    <Dialog
      isOpen
      onClose={onClose}
      width={680}
      title={`${theirs.by.initials} has also read ${jar.name}`}
      sentence="Both stay on record; you say which one counts, and why."
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Decide later
          </Button>
          <Button
            density="bench"
            kind="primary"
            busy={isBusy}
            why={reason.trim() === '' ? 'Say why first.' : undefined}
            onClick={() => onDecide({ count, reason })}
          >
            {count === 'mine' ? 'Count mine, keep both' : `Count ${theirs.by.initials}, keep both`}
          </Button>
        </>
      }
    >
      <div className="grid gap-3 sm:grid-cols-2" role="radiogroup" aria-label="Which counts">
        <Side
          name={`Yours, ${person.initials}`}
          lines={mine.map((e) => `${attributeName(e.attribute)} ${e.typed}`)}
          isPicked={count === 'mine'}
          onPick={() => setCount('mine')}
        />
        <Side
          name={theirs.by.name}
          lines={theirs.readings.map(
            (r) =>
              `${attributeName(r.attribute)} ${r.word ?? (r.value === null ? r.typed : shownValue(writtenAs(jar.fields, r.attribute), r.value))}`,
          )}
          isPicked={count === 'theirs'}
          onPick={() => setCount('theirs')}
        />
      </div>
      {apart ? (
        <p className="font-650">
          {distance(apart.attribute, apart.difference)} apart in {attributeName(apart.attribute)}. A jar’s own
          scatter is {distance(apart.attribute, apart.scatter)}:{' '}
          {apart.agree ? 'they agree.' : 'they do not agree.'}
        </p>
      ) : null}
      <Field label="Reason" density="bench" value={reason} onText={setReason} />
    </Dialog>
  )
}

type SideProps = { name: string; lines: string[]; isPicked: boolean; onPick: () => void }

export function Side({ name, lines, isPicked, onPick }: SideProps) {
  return (
    <button
      type="button"
      role="radio"
      aria-checked={isPicked}
      onClick={onPick}
      className={`min-h-16 rounded p-3 text-left ${isPicked ? 'border-[2.5px] border-ink bg-typed' : 'border-2 border-rule bg-paper'}`}
    >
      <b className="text-20">{name}</b>
      {lines.map((line, i) => (
        <span key={i} className="block text-20">
          {line}
        </span>
      ))}
    </button>
  )
}
