'use client'

import { useEffect, useState } from 'react'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { Button } from '@/components/ui/button'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** A jar that rests closed: how long still, and when it is ready. */
export function RestPanel({
  jar,
  onWalk,
  onChange,
}: {
  jar: BenchJarPage
  onWalk: () => void
  onChange: () => void
}) {
  const until = Date.parse(jar.restUntil ?? jar.now)
  const [left, setLeft] = useState(() => until - Date.parse(jar.now))
  useEffect(() => {
    const timer = setInterval(() => {
      const rest = until - Date.now()
      setLeft(rest)
      if (rest <= 0) onChange()
    }, 15_000)
    return () => clearInterval(timer)
  }, [until, onChange])
  const minutes = Math.max(0, Math.ceil(left / 60_000))
  const ready = new Date(until).toLocaleTimeString('en-GB', {
    hour: '2-digit',
    minute: '2-digit',
    timeZone: jar.zone,
  })
  return (
    <div className="flex flex-1 flex-col items-start gap-6 px-4 pt-8 sm:px-7">
      <div className="flex items-end gap-8">
        <JarGlyph height={160} state="resting" title="Resting, closed" />
        <p className="text-36 leading-tight sm:text-48">
          Rests for{' '}
          <b>{minutes >= 60 ? `${Math.floor(minutes / 60)} h ${minutes % 60} min` : `${minutes} min`}</b>
          <span className="block text-20">
            Ready at {ready}. Opened earlier it is not comparable with the initial.
          </span>
        </p>
      </div>
      <Button density="bench" kind="primary" onClick={onWalk}>
        Back to the walk
      </Button>
    </div>
  )
}
