'use client'

import { useEffect, useState } from 'react'
import { restHours, restOf } from '@/lib/batch/rules/rest'

/** The hours of rest as a ruler to 72 h: what is over, from when it may be read, and the countdown to it. */
export function RestClock({ restedHours }: { restedHours: number }) {
  const [passed, setPassed] = useState(0)
  useEffect(() => {
    const from = Date.now()
    const timer = setInterval(() => setPassed((Date.now() - from) / 3_600_000), 30_000)
    return () => clearInterval(timer)
  }, [restedHours])
  const hours = restedHours + passed
  const rest = restOf(hours)
  const x = (at: number) => (Math.min(at, restHours.most) / restHours.most) * 600
  return (
    <figure className="max-w-[640px]">
      <figcaption className="text-24 font-650" role="timer">
        {rest.toWait ? `${rest.toWait} to wait` : `Rested ${Math.floor(hours)} h`}
      </figcaption>
      <svg
        viewBox="-20 -6 650 52"
        className="h-auto w-full"
        role="img"
        aria-label={`${Math.floor(hours)} of ${restHours.least} to ${restHours.most} h`}
      >
        <path
          d={`M${x(restHours.least)} 14H600`}
          stroke="var(--rule)"
          strokeWidth="14"
          strokeDasharray="2 4"
          fill="none"
        />
        <path d="M0 14H600" stroke="var(--ink)" strokeWidth="1.5" fill="none" />
        <path d={`M0 14H${x(hours)}`} stroke="var(--ink)" strokeWidth="5" fill="none" />
        <circle cx={x(hours)} cy="14" r="7" fill="var(--ink)" />
        {[0, 24, 48, 72].map((at) => (
          <text key={at} x={x(at)} y="42" fontSize="16" textAnchor="middle">
            {at} h
          </text>
        ))}
      </svg>
      <p className="text-17">{rest.sentence}</p>
    </figure>
  )
}
