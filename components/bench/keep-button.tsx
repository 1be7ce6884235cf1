import { Button } from '@/components/ui/button'

export function whyNotKeep(
  count: number,
  verdict: { state: string; sentence?: string | null } | undefined,
): string | undefined {
  if (verdict?.state === 'impossible') return 'One number cannot be so.'
  return count === 0 ? 'Type at least one value.' : undefined
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
  if (left > 0 && onStep)
    return (
      <div className="grid grid-cols-[1fr_auto] gap-3">
        <Button density="bench" kind="primary" onClick={onStep}>
          Next field
        </Button>
        <Button density="bench" busy={busy} why={why} onClick={onKeep}>
          Keep
        </Button>
      </div>
    )
  return (
    <Button density="bench" kind="primary" className="w-full" busy={busy} why={why} onClick={onKeep}>
      {hasNext ? 'Keep, open next' : 'Keep'}
    </Button>
  )
}
