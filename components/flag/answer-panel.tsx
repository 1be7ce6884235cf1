'use client'

import { useState } from 'react'
import { StandingMark } from '@/components/marks/standing-mark'
import { Button } from '@/components/ui/button'
import type { FlagPage } from '@/lib/flag/queries/one'
import { spokenDay } from '@/lib/study/rules/calendar'
import { AnswerForm } from './answer-form'
import { Answered } from './answered'
import { ClosingForm } from './closing-form'
import { levelStanding, levelWord } from './flag-words'
import type { FlagRights } from './rights'

type Props = { flag: FlagPage; rights: FlagRights; onChanged: () => void }

/** The right column: what was answered, or what this person may say now. */
export function AnswerPanel({ flag, rights, onChanged }: Props) {
  // A form whose send was refused keeps standing with its text, whatever the flag has become meanwhile.
  const [isKept, setIsKept] = useState(false)
  const [isAnew, setIsAnew] = useState(false)
  const isOpen = flag.state === 'open'
  const hasForm = rights.mayAnswer && (isOpen || isAnew || isKept)
  const closes = rights.mayCloseOut && flag.state === 'answered' && !hasForm
  const standing = levelStanding(flag)
  const done = () => {
    setIsKept(false)
    setIsAnew(false)
    onChanged()
  }
  const stale = () => {
    setIsKept(true)
    onChanged()
  }
  return (
    <section aria-labelledby="answer" className="flex flex-col gap-3 border-2 border-ink bg-paper p-4">
      <div>
        <div className="flex items-end justify-between gap-3">
          <h2 id="answer" className="text-20 font-650">
            {titleOf(flag, rights)}
          </h2>
          <span
            className={`flex items-end gap-2.5 text-15 font-650 ${flag.level === 'out' || flag.level === 'leaning' ? 'text-alarm' : ''}`}
          >
            {standing ? <StandingMark standing={standing} size={20} className="mb-0.5" /> : null}
            {levelWord(flag)}
          </span>
        </div>
        {flag.pullNote ? (
          <p className="mt-1.5 text-14 text-soft">
            {flag.readBy}
            {flag.readOn ? `, ${spokenDay(flag.readOn, false)}` : ''}: “{flag.pullNote}”
          </p>
        ) : null}
      </div>
      {isOpen ? null : <Answered flag={flag} />}
      {hasForm ? <AnswerForm flag={flag} rights={rights} onDone={done} onStale={stale} /> : null}
      {closes ? <ClosingForm flag={flag} onDone={done} onStale={onChanged} /> : null}
      {flag.state === 'answered' && rights.mayAnswer && !hasForm ? (
        <Button kind="link" className="self-start" onClick={() => setIsAnew(true)}>
          Answer it anew
        </Button>
      ) : null}
      {isOpen && !rights.mayAnswer ? (
        <p className="text-15">
          A formulator or QA names the cause. What you saw helps them: say it in a comment.
        </p>
      ) : null}
      {flag.state === 'answered' && !rights.mayCloseOut ? (
        <p className="border-t border-ink pt-2 text-15">Out at a station that decides: QA closes it.</p>
      ) : null}
    </section>
  )
}

function titleOf(flag: FlagPage, rights: FlagRights): string {
  if (flag.state === 'closed') return flag.answeredBy ? 'Answered and closed' : 'Closed'
  if (flag.state === 'answered') return 'Answered'
  return rights.mayAnswer ? 'Your answer' : 'Wants an answer'
}
