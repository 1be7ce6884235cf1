'use client'

import { lazy, Suspense, type ReactNode } from 'react'
import type { Density } from './button'
import { whenReached } from './load-ahead'

export type DialogProps = {
  isOpen: boolean
  onClose: () => void
  title: ReactNode
  /** One sentence: what happens and what stays. */
  sentence?: ReactNode
  density?: Density
  children?: ReactNode
  /** The acts at the right of the last line: leave first, do last. */
  acts?: ReactNode
  width?: number
  /** It takes the screen's height, and its children share what title and acts leave of it. */
  fills?: boolean
}

export const loadDialog = () => import('./dialog-frame')
const Frame = lazy(async () => ({ default: (await whenReached(loadDialog)).DialogFrame }))

/** Drawn by `DialogFrame`, which comes after the page that it stands on (`loadDialog`). */
export function Dialog(props: DialogProps) {
  if (!props.isOpen) return null
  return (
    <Suspense fallback={null}>
      <Frame {...props} />
    </Suspense>
  )
}
