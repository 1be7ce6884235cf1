'use client'

import type { ReactNode } from 'react'
import { Dialog } from '@/components/ui/dialog'

type Props = {
  title: string
  onClose: () => void
  /** A `MarkPicture`. */
  picture: ReactNode
  /** What moves the marks, by buttons and keys. */
  tools: ReactNode
  /** What the marks come to. */
  told: ReactNode
  /** What takes it over. */
  act: ReactNode
}

/** A photo being marked: figure and confirmation stay in view, tools are scrolled, the picture takes what is left. */
export function MarkTable({ title, onClose, picture, tools, told, act }: Props) {
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={title}
      density="bench"
      width={1240}
      fills
      acts={
        <>
          <div aria-live="polite" className="mr-auto">
            {told}
          </div>
          {act}
        </>
      }
    >
      <div className="grid min-h-0 flex-1 grid-rows-[minmax(46%,1fr)_minmax(0,auto)] gap-x-5 gap-y-3 landscape:grid-cols-[minmax(0,1fr)_minmax(0,min(400px,50%))] landscape:grid-rows-[minmax(0,1fr)]">
        <div className="grid min-h-0 place-items-center [container-type:size]">{picture}</div>
        <div className="-mx-1 flex min-h-0 min-w-0 flex-col gap-4 overflow-y-auto px-1 py-1">{tools}</div>
      </div>
    </Dialog>
  )
}
