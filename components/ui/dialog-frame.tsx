'use client'

import { Dialog as Radix } from 'radix-ui'
import type { DialogProps } from './dialog'

/** Two pixels of ink, standing on a line of five. Escape leaves. */
export function DialogFrame({
  isOpen,
  onClose,
  title,
  sentence,
  density,
  children,
  acts,
  width = 460,
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
          className="floats fixed left-1/2 top-1/2 z-50 max-h-[92dvh] w-[calc(100vw-32px)] -translate-x-1/2 -translate-y-1/2 overflow-y-auto px-5 pb-[18px] pt-[18px]"
        >
          <Radix.Title className={`font-650 ${isBench ? 'text-26' : 'text-20'}`}>{title}</Radix.Title>
          {sentence ? <p className={`mt-2 ${isBench ? 'text-18' : 'text-15'}`}>{sentence}</p> : null}
          {children ? <div className="mt-3.5 flex flex-col gap-3.5">{children}</div> : null}
          {acts ? (
            <div className="mt-4 flex flex-wrap items-start justify-end gap-[var(--control-gap)]">{acts}</div>
          ) : null}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  )
}
