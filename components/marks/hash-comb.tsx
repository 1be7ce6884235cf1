import { Figure } from './figure'
import { hashCombShapes } from './hash-comb-shapes'

/** The comb of a frozen case's SHA-256. The digits themselves stand beside it, so it needs no reading aloud. */
export function HashComb({
  sha256,
  width = 300,
  height = 32,
  className,
}: {
  sha256: string
  width?: number
  height?: number
  className?: string
}) {
  return (
    <Figure
      shapes={hashCombShapes(sha256, { width, height })}
      view={{ x: 0, y: 0, width, height: height + 2 }}
      className={className}
    />
  )
}
