import type { ReactNode } from 'react'

type Props = {
  done: number
  total: number
  /** "studies are written": read after the numbers. */
  what: ReactNode
  /** "about two minutes more" */
  remains?: ReactNode
  sentence?: ReactNode
  act?: ReactNode
}

/** Long work as a shelf: what is done stands drawn, what is to do is dotted, and the shelf's line grows. */
export function ProgressJars({ done, total, what, remains, sentence, act }: Props) {
  const places = Math.max(1, Math.min(total, 18))
  const full = total === 0 ? 0 : (done / total) * places
  const pitch = 48
  return (
    <div>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6">
        <p className="text-30 leading-tight">
          <b>
            {done} of {total}
          </b>{' '}
          {what}
        </p>
        {remains ? <p className="text-17">{remains}</p> : null}
      </div>
      <svg
        viewBox={`0 0 ${places * pitch} 48`}
        className="mt-3 block w-full"
        role="progressbar"
        aria-valuemin={0}
        aria-valuemax={total}
        aria-valuenow={done}
        aria-label={`${done} of ${total}`}
      >
        <path d={`M0 45H${places * pitch}`} stroke="var(--rule)" strokeWidth="1" />
        <path d={`M0 45H${full * pitch}`} stroke="var(--ink)" strokeWidth="4" />
        {Array.from({ length: places }, (_, place) => (
          <g key={place} transform={`translate(${24 + place * pitch} 43)`}>
            <PlaceJar share={Math.min(1, Math.max(0, full - place))} />
          </g>
        ))}
      </svg>
      <div className="mt-2 flex flex-wrap items-start justify-between gap-3">
        <p className="text-15 text-soft">{sentence}</p>
        {act}
      </div>
    </div>
  )
}

function PlaceJar({ share }: { share: number }) {
  if (share >= 1) {
    return (
      <>
        <path
          d="M-11 -35V-3Q-11 -1 -9 -1H9Q11 -1 11 -3V-35Z"
          fill="var(--cream)"
          stroke="var(--ink)"
          strokeWidth="1.75"
        />
        <rect x="-12.5" y="-40" width="25" height="4.6" rx="1.2" fill="var(--ink)" />
      </>
    )
  }
  if (share > 0) {
    return (
      <>
        <rect x="-10" y={-2 - 30 * share} width="20" height={30 * share} fill="var(--cream)" />
        <path
          d="M-11 -35V-3Q-11 -1 -9 -1H9Q11 -1 11 -3V-35M-14 -36H-9M14 -36H9"
          fill="none"
          stroke="var(--ink)"
          strokeWidth="1.75"
        />
      </>
    )
  }
  return (
    <path
      d="M-11 -35V-1H11V-35M-11 -39H11"
      fill="none"
      stroke="var(--ink)"
      strokeWidth="1.5"
      strokeLinecap="round"
      strokeDasharray="0.01 3.4"
    />
  )
}
