'use client'

import { useState } from 'react'
import { FollowsList } from '@/components/bench/follows-list'
import { useOutbox } from '@/components/device/use-outbox'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import { newId } from '@/lib/db/id'
import { jarKeys } from '@/lib/jar/keys'
import type { MishapKind, NotedMishap } from '@/lib/jar/schema'

const causes: { kind: MishapKind; says: string }[] = [
  { kind: 'missed', says: 'oven could not be opened' },
  { kind: 'missed', says: 'ran out of time' },
  { kind: 'broken', says: 'broken' },
  { kind: 'lost', says: 'not in its place' },
  { kind: 'wrong jar', says: 'opened by mistake' },
]

const whatItMeans: Record<MishapKind, string> = {
  missed: 'It goes back to its place and is asked for at its next pull.',
  broken: 'It is gone: nothing more is asked of it.',
  lost: 'It counts as lost: nothing more is asked of it.',
  'wrong jar': 'It is spent by that, whatever it was kept for: nothing more is asked of it.',
  'pulled early':
    'Its readings stand at the time they are really taken, which is what the trend is computed from.',
}

type Props = {
  jar: Pick<BenchJar, 'name' | 'code' | 'pullJarId'>
  versionNow: () => Promise<number>
  /** Before its window: the one thing to note is that it is pulled early. */
  isEarly?: boolean
  onClose: () => void
  /** With the code of the jar that takes its place, where one does. */
  onDone: (substitute?: string) => void
}

/** A jar that is not read, or not when it should be, is an entry too: what happened, why, and what follows. */
export function MissDialog({ jar, versionNow, isEarly = false, onClose, onDone }: Props) {
  const { send } = useOutbox()
  const [kind, setKind] = useState<MishapKind | null>(isEarly ? 'pulled early' : null)
  const [reason, setReason] = useState('')
  const [noted, setNoted] = useState<NotedMishap | null>(null)
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)

  async function note() {
    setBusy(true)
    setError(null)
    const version = await versionNow()
    const now = new Date().toISOString()
    try {
      const outcome = await send<NotedMishap>({
        url: jarKeys.mishaps(jar.code),
        body: {
          ...{ id: newId(), kind, reason, claimedAt: now, deviceNow: now },
          pull: { pullJarId: jar.pullJarId, version },
        },
        about: {
          ...{ kind: 'missed', label: `Jar ${jar.name}`, code: jar.code, pullJarId: jar.pullJarId },
          ...{ what: `${kind}: ${reason}`, href: `/bench/${jar.code}` },
        },
      })
      if (outcome.how === 'sent' && outcome.answer.follows) setNoted(outcome.answer)
      else onDone()
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  if (noted?.follows) {
    return (
      <Dialog isOpen onClose={() => onDone()} title={`${jar.name} is noted as not read`} density="bench">
        <FollowsList jar={jar} follows={noted.follows} onTaken={onDone} onNone={() => onDone()} />
      </Dialog>
    )
  }
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={isEarly ? `Why is ${jar.name} pulled early?` : `Why is ${jar.name} not read?`}
      sentence={kind ? whatItMeans[kind] : undefined}
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind={isEarly ? 'primary' : 'danger-asked'}
            busy={isBusy}
            why={kind === null || reason.trim() === '' ? 'Say why first.' : undefined}
            onClick={note}
          >
            {isEarly ? 'Note it and read it' : 'Note it as not read'}
          </Button>
        </>
      }
    >
      {isEarly ? null : (
        <div className="flex flex-wrap gap-3" role="group" aria-label="What happened">
          {causes.map((cause) => (
            <Button
              key={cause.says}
              density="bench"
              aria-pressed={kind === cause.kind && reason === cause.says}
              className={
                kind === cause.kind && reason === cause.says ? 'shadow-[inset_0_-4px_0_var(--ink)]' : ''
              }
              onClick={() => {
                setKind(cause.kind)
                setReason(cause.says)
              }}
            >
              {cause.says}
            </Button>
          ))}
        </div>
      )}
      <Field
        label="Reason"
        density="bench"
        value={reason}
        onText={(text) => {
          setReason(text)
          setKind((now) => now ?? 'missed')
        }}
      />
      <ErrorNote error={error} />
    </Dialog>
  )
}
