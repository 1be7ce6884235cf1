import { changesAcross, findOutline, sharpness } from './outline'
import { shrink, type Picture } from './picture'
import { extent, profileOf } from './profile'
import { decide, type Sureness } from './decide'
import { edgesOf } from './segments'

/** Rows of the picture at which the lines cross the jar's axis, with fractions, from its top. */
export type PhotoLines = { fillTop: number; topEdge: number; bottomEdge: number; base: number }

export type PhotoProposal = {
  sureness: Sureness
  /** Why it is not sure, or what it sees; one sentence each. */
  reasons: string[]
  lines: PhotoLines | null
  /** The jar's middle at its middle row, half its width in pixels, and how far it leans, in degrees. */
  jar: { x: number; y: number; halfWidth: number; tiltDegrees: number } | null
}

const aboutRows = 420

export function proposeLines(picture: Picture): PhotoProposal {
  const small = shrink(picture, aboutRows)
  const across = changesAcross(small)
  const outline = findOutline(small, across)
  const none = { lines: null, jar: null }
  if (!outline)
    return { ...none, sureness: 'look again', reasons: ['The sides of the jar cannot be made out.'] }
  const profile = profileOf(small, outline)
  const within = extent(small, across, sharpness(across), outline)
  if (!within) return { ...none, sureness: 'look again', reasons: ['The jar is too small in the photo.'] }
  const edges = edgesOf(profile, within)
  const found = decide(profile, within, edges)
  const down = Math.cos(outline.tiltRadians)
  const y = (row: number) => (outline.y + (profile.from + row) * down) * small.scale
  return {
    sureness: found.sureness,
    reasons: found.reasons,
    lines: found.lines && {
      fillTop: y(found.lines.fillTop),
      topEdge: y(found.lines.topEdge),
      bottomEdge: y(found.lines.bottomEdge),
      base: y(found.lines.base),
    },
    jar: {
      x: outline.x * small.scale,
      y: outline.y * small.scale,
      halfWidth: outline.halfWidth * small.scale,
      tiltDegrees: (outline.tiltRadians * 180) / Math.PI,
    },
  }
}
