import type { PhotoProposal } from '@/lib/science/photo-layers/propose'

/** The same proposal in pixels of a picture that is so many times as high. */
export function scaledProposal({ lines, jar, ...told }: PhotoProposal, by: number): PhotoProposal {
  const tenth = (value: number) => Math.round(value * by * 10) / 10
  return {
    ...told,
    lines: lines && {
      fillTop: tenth(lines.fillTop),
      topEdge: tenth(lines.topEdge),
      bottomEdge: tenth(lines.bottomEdge),
      base: tenth(lines.base),
    },
    jar: jar && {
      x: tenth(jar.x),
      y: tenth(jar.y),
      halfWidth: tenth(jar.halfWidth),
      tiltDegrees: jar.tiltDegrees,
    },
  }
}
