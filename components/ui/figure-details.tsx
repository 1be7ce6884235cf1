'use client'

import { Popover } from 'radix-ui'
import { useState, type ReactNode } from 'react'
import { Busy } from './busy'
import { FigureFactsPanel } from './figure-facts'
import type { FigureFacts } from '@/lib/science/methods/method'

type Props = {
  /** The figure as it is read, unit included: "83.4 %". */
  figure: string
  /** What it is computed from, put together when it is asked for. */
  facts?: () => FigureFacts
  /** Instead of facts: what is drawn once the panel is open, such as facts that are fetched then. */
  content?: ReactNode
  /** Drawn in place of the figure's text. */
  children?: ReactNode
  density?: 'bench'
  className?: string
}

/**
 * A figure that says what it is computed from: dotted under the number, a panel where it is pressed. It floats, so
 * it stands on a line of five pixels and alone has a shadow. Printed, only the number is left.
 */
export function FigureDetails({ figure, facts, content, children, density, className }: Props) {
  const [isOpen, setOpen] = useState(false)
  return (
    <Popover.Root open={isOpen} onOpenChange={setOpen}>
      <Popover.Trigger
        aria-label={`What ${figure} is computed from`}
        data-density={density}
        className={`figure-details ${className ?? ''}`}
      >
        {children ?? figure}
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          data-screen-only
          data-density={density}
          aria-label={`What ${figure} is computed from`}
          align="start"
          sideOffset={8}
          collisionPadding={12}
          className="floats z-50 max-h-[min(640px,var(--radix-popover-content-available-height))] w-[min(420px,calc(100vw-24px))] overflow-y-auto text-left font-430 text-ink"
        >
          {isOpen ? (content ?? (facts ? <FigureFactsPanel facts={facts()} /> : null)) : null}
          <Popover.Close
            aria-label="Put away"
            className="absolute right-1.5 top-1.5 flex size-9 items-center justify-center"
          >
            <svg viewBox="0 0 14 14" width="14" height="14" aria-hidden>
              <path d="M1 1L13 13M13 1L1 13" stroke="currentColor" strokeWidth="2" />
            </svg>
          </Popover.Close>
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  )
}

/** While facts are on their way. */
export function FigureFactsWait() {
  return (
    <p className="flex min-h-24 items-center gap-2 px-5">
      <Busy /> Looking up what went in
    </p>
  )
}
