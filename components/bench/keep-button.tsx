import { Button } from '@/components/ui/button'

const nothingYet = 'Type at least one value.'

export function whyNotKeep(
  count: number,
  verdict: { state: string; sentence?: string | null } | undefined,
): string | undefined {
  if (verdict?.state === 'impossible') return 'One number cannot be so.'
  return count === 0 ? nothingYet : undefined
}

type KeepProps = {
  busy: boolean
  left: number
  why: string | undefined
  hasNext: boolean
  onKeep: () => void
  onStep: (() => void) | null
}

/** While fields are open it steps on; keeping with some left out stays possible beside it. */
export function KeepButton({ busy, left, why, hasNext, onKeep, onStep }: KeepProps) {
  const isEmpty = why === nothingYet
  if (onStep && (left > 0 || !isEmpty))
    return (
      <div className="grid grid-flow-col auto-cols-fr gap-3 [&_.btn]:px-3">
        <Button density="bench" kind="primary" onClick={onStep}>
          {left > 0 ? 'Next field' : 'To the photo'}
        </Button>
        {isEmpty ? null : (
          <Button density="bench" busy={busy} why={why} onClick={onKeep}>
            Keep
          </Button>
        )}
      </div>
    )
  return (
    <Button density="bench" kind="primary" className="w-full" busy={busy} why={why} onClick={onKeep}>
      {hasNext ? 'Keep, open next' : 'Keep'}
    </Button>
  )
}
