import { closestPacking } from '@/lib/science/phase-fraction'
import type { Point } from '../marks/shape'
import { areaOf, centreOf, cutAt, grow, inradius, shrink } from './convex'

export type Section = { width: number; height: number }

/**
 * Drops cut through, as outlines inside the window, whose area is `phi` of the window's: a cell for
 * every drop (a power diagram of drops of mixed size, evened out), each shrunk by the same film and
 * rounded, more of both the less there is inside. The same input gives the same picture. A cut shows
 * the inside at the same share of area as of volume; the shapes themselves are drawn, not measured.
 */
export function packDrops(phi: number, dropSize: number, section: Section, seed = 7): Point[][] {
  if (!(phi > 0) || !(dropSize > 0)) return []
  const wanted = Math.min(phi, 0.995) * section.width * section.height
  const cells = cellsOf(dropSize, section, seed).map((cell) => ({ cell, radius: inradius(cell) }))
  const drops = (film: number, roundness: number) =>
    cells.flatMap(({ cell, radius }) => {
      const left = radius - film
      if (left <= 0) return []
      const rounding = left * roundness
      const core = shrink(cell, film + rounding)
      const inside = core.length > 0 ? clipTo(grow(core, rounding), section) : []
      return inside.length > 2 ? [inside] : []
    })
  const area = (film: number, roundness: number) =>
    drops(film, roundness).reduce((sum, drop) => sum + areaOf(drop), 0)
  // Round below closest packing; above it, and where round drops leave too much between, flattened.
  let roundness =
    phi <= closestPacking ? 0.995 : Math.max(0.18, ((0.99 - phi) / (0.99 - closestPacking)) * 0.8)
  while (roundness > 0.02 && area(0, roundness) < wanted) roundness *= 0.86
  let [thin, thick] = [0, dropSize]
  for (let turn = 0; turn < 26; turn += 1) {
    const film = (thin + thick) / 2
    if (area(film, roundness) > wanted) thin = film
    else thick = film
  }
  return drops((thin + thick) / 2, roundness)
}

function clipTo(outline: Point[], { width, height }: Section): Point[] {
  return cutAt(cutAt(cutAt(cutAt(outline, 1, 0, width), 0, 1, height), -1, 0, 0), 0, -1, 0)
}

type Site = { x: number; y: number; radius: number }

function cellsOf(dropSize: number, { width, height }: Section, seed: number): Point[][] {
  const random = randomFrom(seed)
  const margin = dropSize
  const frame = { left: -margin, top: -margin, right: width + margin, bottom: height + margin }
  const count = Math.max(
    4,
    Math.round(((frame.right - frame.left) * (frame.bottom - frame.top)) / (dropSize * dropSize * 0.82)),
  )
  let sites = Array.from({ length: count }, (): Site => ({
    x: frame.left + random() * (frame.right - frame.left),
    y: frame.top + random() * (frame.bottom - frame.top),
    radius: dropSize * 0.5 * (0.45 + 0.9 * random() ** 1.4),
  }))
  let cells: Point[][] = []
  for (let turn = 0; turn < 14; turn += 1) {
    cells = sites.map((site) => cellOf(site, sites, frame))
    sites = sites.map((site, index) => {
      const cell = cells[index]
      if (!cell || cell.length < 3) return site
      const [x, y] = centreOf(cell)
      return { ...site, x, y }
    })
  }
  return sites.map((site) => cellOf(site, sites, frame)).filter((cell) => cell.length > 2)
}

type Frame = { left: number; top: number; right: number; bottom: number }

/** Where a drop is nearer than every other, distances shortened by the drops' own size. */
function cellOf(site: Site, sites: Site[], { left, top, right, bottom }: Frame): Point[] {
  let cell: Point[] = [
    [left, top],
    [right, top],
    [right, bottom],
    [left, bottom],
  ]
  const own = site.x ** 2 + site.y ** 2 - site.radius ** 2
  for (const other of sites) {
    if (other === site || cell.length === 0) continue
    const [a, b] = [2 * (other.x - site.x), 2 * (other.y - site.y)]
    cell = cutAt(cell, a, b, other.x ** 2 + other.y ** 2 - other.radius ** 2 - own)
  }
  return cell
}

/** Numbers from 0 to 1 that are the same for the same seed (mulberry32). */
function randomFrom(seed: number): () => number {
  let state = seed
  return () => {
    state = (state + 0x6d2b79f5) | 0
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state)
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296
  }
}
