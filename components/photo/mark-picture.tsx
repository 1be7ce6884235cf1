'use client'

import { useRef, type PointerEvent, type ReactNode } from 'react'

/** A place on the copy, in its pixels. */
export type Place = { x: number; y: number }

type Props = {
  copy: { url: string; width: number; height: number }
  /** The picture and what is drawn over it. */
  children: ReactNode
  /** What the loupe shows: under the finger, else what is picked. */
  at: Place
  /** Where the finger is, so that the loupe keeps out of its way. */
  finger: Place | null
  /** Drawn over the middle of the loupe. */
  loupeMark: ReactNode
  cursor: string
  onDown: (place: Place) => void
  onDrag: (place: Place) => void
  onUp: () => void
}

export const loupePx = 140
/** CSS pixels for one pixel of the copy. */
const zoom = 2.5

/** A photo that is marked by hand, with a loupe on the place in question; as large as its container lets it be. */
export function MarkPicture({ copy, children, at, finger, loupeMark, cursor, onDown, onDrag, onUp }: Props) {
  const box = useRef<HTMLDivElement>(null)

  function place(event: PointerEvent): Place {
    const { left, top, width, height } = box.current!.getBoundingClientRect()
    return {
      x: ((event.clientX - left) / width) * copy.width,
      y: ((event.clientY - top) / height) * copy.height,
    }
  }

  const isRight = finger ? finger.x < copy.width / 2 : true
  const isLow = at.y < copy.height * 0.4
  return (
    <div
      ref={box}
      className={`relative touch-none overflow-hidden outline outline-2 outline-ink ${cursor}`}
      style={{
        width: `calc(min(100cqw, 100cqh * ${copy.width} / ${copy.height}) - 4px)`,
        aspectRatio: `${copy.width} / ${copy.height}`,
      }}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId)
        onDown(place(event))
      }}
      onPointerMove={(event) => (finger ? onDrag(place(event)) : undefined)}
      onPointerUp={onUp}
      onPointerCancel={onUp}
    >
      {children}
      <div
        aria-hidden
        className={`pointer-events-none absolute overflow-hidden rounded-full border-[3px] border-[#0E1D17] bg-[#0E1D17] [@container(max-height:330px)]:scale-[.68] [@container(max-height:200px)]:scale-50 ${isRight ? 'right-2' : 'left-2'} ${isLow ? 'bottom-2' : 'top-2'}`}
        style={{
          width: loupePx,
          height: loupePx,
          transformOrigin: `${isRight ? 'right' : 'left'} ${isLow ? 'bottom' : 'top'}`,
          backgroundImage: `url(${copy.url})`,
          backgroundRepeat: 'no-repeat',
          backgroundSize: `${copy.width * zoom}px ${copy.height * zoom}px`,
          backgroundPosition: `${loupePx / 2 - 3 - at.x * zoom}px ${loupePx / 2 - 3 - at.y * zoom}px`,
        }}
      >
        {loupeMark}
      </div>
    </div>
  )
}

/** Hairs that cross where a point is being set. */
export function LoupeCross() {
  // A photo is as light in the dark, so that what is drawn on it does not change with the theme.
  const hair = 'absolute block bg-[#0E1D17] outline outline-1 outline-white'
  return (
    <>
      <span className={`${hair} inset-x-0 h-px`} style={{ top: loupePx / 2 - 3 }} />
      <span className={`${hair} inset-y-0 w-px`} style={{ left: loupePx / 2 - 3 }} />
    </>
  )
}
