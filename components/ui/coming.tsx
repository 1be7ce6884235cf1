'use client'

import { useEffect, useState, type ReactNode } from 'react'
import type { Density } from './button'
import { Dialog } from './dialog'

const quietMs = 1_500

/** "The camera is not on this device yet …": told of what is still being fetched, as soon as that takes long. */
export function Coming({ what }: { what: string }) {
  const [isLate, setLate] = useState(false)
  useEffect(() => {
    const timer = setTimeout(() => setLate(true), quietMs)
    return () => clearTimeout(timer)
  }, [])
  return (
    <p role="status" className="text-18">
      {isLate
        ? `${what} is not on this device yet, and the server is not reached. It opens by itself as soon as the network is back. Everything else can be used meanwhile.`
        : null}
    </p>
  )
}

type Props = { what: string; title: ReactNode; density?: Density; onClose: () => void }

/** The same where a dialog opens. */
export function ComingDialog({ what, title, density, onClose }: Props) {
  return (
    <Dialog isOpen onClose={onClose} title={title} {...(density ? { density } : {})}>
      <Coming what={what} />
    </Dialog>
  )
}
