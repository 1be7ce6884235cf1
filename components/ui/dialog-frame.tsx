'use client'

import { Dialog as Radix } from 'radix-ui'
import type { DialogProps } from './dialog'

/**
 * Two pixels of ink, standing on a line of five. Escape leaves. What is too much for the screen is scrolled between title
 * and acts, which stay; on a screen too low for that the whole dialog is scrolled.
 */
export function DialogFrame({
  isOpen,
  onClose,
  title,
  sentence,
  density,
  children,
  acts,
  width = 460,
  fills,
}: DialogProps) {
  const isBench = density === 'bench'
  return (
    <Radix.Root open={isOpen} onOpenChange={(open) => (open ? undefined : onClose())}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-50 bg-ground/70" />
        <Radix.Content
          data-density={density}
          aria-describedby={undefined}
          style={{ maxWidth: isBench ? Math.max(width, 560) : width }}
          className={`floats fixed left-1/2 top-1/2 z-50 flex w-[calc(100vw-32px)] -translate-x-1/2 -translate-y-1/2 flex-col overflow-y-auto pb-[18px] pt-[18px] ${fills ? 'h-[94dvh]' : 'max-h-[92dvh]'}`}
        >
          <Radix.Title className={`shrink-0 px-5 font-650 ${isBench ? 'text-26' : 'text-20'}`}>
            {title}
          </Radix.Title>
          <div
            className={`mt-1 min-h-0 px-5 py-1 ${isBench ? 'text-17' : ''} [@media(max-height:340px)]:shrink-0 ${fills ? 'flex flex-1 flex-col [@media(max-height:340px)]:min-h-[300px]' : 'overflow-y-auto'}`}
          >
            {sentence ? <p className={`mt-1 ${isBench ? 'text-18' : 'text-15'}`}>{sentence}</p> : null}
            {children ? (
              <div className={`flex flex-col gap-3.5 ${fills ? 'min-h-0 flex-1' : 'mt-2.5'}`}>{children}</div>
            ) : null}
          </div>
          {acts ? (
            <div className="mt-3 flex shrink-0 flex-wrap items-start justify-end gap-[var(--control-gap)] px-5 [&>span]:max-w-[400px]">
              {acts}
            </div>
          ) : null}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  )
}
