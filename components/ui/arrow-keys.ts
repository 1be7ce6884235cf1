import type { KeyboardEvent } from 'react'

const steps: Record<string, number> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }

/** For a row of radios or tabs: the arrows go from one to the next and round; pressing is for Space and Enter. */
export function arrowKeys(event: KeyboardEvent<HTMLElement>): void {
  const step = steps[event.key]
  const all = [...event.currentTarget.querySelectorAll<HTMLElement>('[role=radio], [role=tab]')]
  const at = all.indexOf(event.target as HTMLElement)
  if (step === undefined || at < 0) return
  event.preventDefault()
  all.at((at + step) % all.length)?.focus()
}
