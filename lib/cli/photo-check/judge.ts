import jpeg from 'jpeg-js'
import type { PhotoProposal } from '@/lib/science/photo-layers/propose'
import { proposeLines } from '@/lib/science/photo-layers/propose'
import { chanceFrom } from '../simulate/chance'
import { drawScene } from './draw'
import { makeScene, trueLines, type Lines, type Scene } from './scene'

export const lineKeys = ['fillTop', 'topEdge', 'bottomEdge', 'base'] as const

/** A photo drawn from a seed, compressed as its scene says. */
export function drawnJpeg(seed: number, height: number): { scene: Scene; bytes: Uint8Array } {
  const chance = chanceFrom(seed)
  const scene = makeScene(chance, height)
  const data = drawScene(scene, chance)
  const { width } = scene
  return { scene, bytes: jpeg.encode({ width, height, data }, scene.jpegQuality).data }
}

export type Judged = {
  seed: number
  isOpaque: boolean
  sureness: PhotoProposal['sureness']
  reasons: string[]
  /** How far the worst of the four lines lies from the truth, in points of fill height; null where none are proposed or none are true. */
  worst: number | null
}

export function judge(seed: number, height: number): Judged {
  const { scene, bytes } = drawnJpeg(seed, height)
  const picture = jpeg.decode(bytes, { useTArray: true })
  const { sureness, reasons, lines } = proposeLines({ ...picture, channels: 4 })
  const truth = trueLines(scene)
  return { seed, isOpaque: truth === null, sureness, reasons, worst: lines && truth && worstOf(lines, truth) }
}

function worstOf(lines: Lines, truth: Lines): number {
  return (
    (100 * Math.max(...lineKeys.map((key) => Math.abs(lines[key] - truth[key])))) /
    (truth.base - truth.fillTop)
  )
}
