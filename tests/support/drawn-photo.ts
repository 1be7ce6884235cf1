import jpeg from 'jpeg-js'
import { drawScene } from '@/lib/cli/photo-check/draw'
import { makeScene, trueLines } from '@/lib/cli/photo-check/scene'
import { chanceFrom } from '@/lib/cli/simulate/chance'

/** A photo of a jar as photo-check draws it, as JPEG, with the rows at which its layers truly end. */
export function drawnPhoto(seed: number, height: number) {
  const chance = chanceFrom(seed)
  const scene = makeScene(chance, height)
  const { width } = scene
  const { data } = jpeg.encode({ width, height, data: drawScene(scene, chance) }, scene.jpegQuality)
  return { bytes: new Uint8Array(data), lines: trueLines(scene), width, height }
}
