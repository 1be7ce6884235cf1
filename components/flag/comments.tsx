'use client'

import { useRef, useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { TextArea } from '@/components/ui/text-area'
import { newId } from '@/lib/db/id'
import type { FlagPage } from '@/lib/flag/queries/one'
import { flagKeys } from '@/lib/flag/keys'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { useFlagAct } from './use-flag-act'

type Props = { flag: FlagPage; mayComment: boolean; onDone: () => void }

/** What people said about the flag beside its answer; nothing said is taken back. */
export function Comments({ flag, mayComment, onDone }: Props) {
  const [text, setText] = useState('')
  const id = useRef<string>(undefined)
  const { act, isSending, fields, error } = useFlagAct()

  async function submit(event: FormEvent) {
    event.preventDefault()
    // One id for one comment: sent twice it stands once.
    id.current ??= newId()
    await act({
      url: flagKeys.comment(flag.number),
      body: { id: id.current, text },
      what: `comment on flag ${flag.number}`,
      text,
      onDone: () => {
        id.current = undefined
        setText('')
        onDone()
      },
    })
  }

  return (
    <section aria-labelledby="comments">
      <h2 id="comments" className="border-b border-ink pb-1 text-17 font-650">
        {flag.comments.length === 0 ? 'No comment yet' : 'Comments'}
      </h2>
      <ol className="divide-y divide-hair">
        {flag.comments.map((comment) => (
          <li key={comment.id} className="py-2 text-15">
            <p className="whitespace-pre-line">{comment.text}</p>
            <p className="text-13 text-soft">
              {comment.name}, {spokenDay(dayIn(flag.zone, comment.writtenAt))}
            </p>
          </li>
        ))}
      </ol>
      {mayComment ? (
        <form onSubmit={submit} noValidate data-screen-only className="mt-3 flex flex-col items-start gap-2">
          <TextArea
            label="Your comment"
            rows={2}
            value={text}
            onText={setText}
            error={fields['text']}
            wrap="w-full"
          />
          <ErrorNote error={error} />
          <Button type="submit" busy={isSending}>
            Comment
          </Button>
        </form>
      ) : null}
    </section>
  )
}
