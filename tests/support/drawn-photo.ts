import { drawnJpeg } from '@/lib/cli/photo-check/judge'
import { trueLines } from '@/lib/cli/photo-check/scene'

/** A photo of a jar as photo-check draws it, with the rows at which its layers truly end. */
export function drawnPhoto(seed: number, height: number) {
  const { scene, bytes } = drawnJpeg(seed, height)
  return { bytes: new Uint8Array(bytes), lines: trueLines(scene), width: scene.width, height }
}
