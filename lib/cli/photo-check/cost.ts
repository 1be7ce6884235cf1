import { makePreview, readPixels } from '@/lib/files/picture'
import { proposeLines } from '@/lib/science/photo-layers/propose'
import { drawnJpeg } from './judge'

export type Cost = { seconds: number; moreMegabytes: number; megabytes: number }

/** What a proposal costs the server: a copy of 2,000 px decoded in the worker, its rows read. */
export async function costOfProposal(): Promise<Cost> {
  const { bytes } = drawnJpeg(71, 2000)
  return costOf(async () => {
    const pixels = await readPixels({ bytes, type: 'image/jpeg', orientation: 1 }, 840)
    proposeLines({ ...pixels, channels: 4 })
  })
}

/** What a preview of 12 megapixels costs, lying on its side as cameras write it. */
export async function costOfPreview(): Promise<Cost> {
  const { bytes } = drawnJpeg(72, 4000)
  return costOf(() => makePreview({ bytes, type: 'image/jpeg', orientation: 6 }, 480))
}

async function costOf(work: () => Promise<unknown>): Promise<Cost> {
  globalThis.gc?.()
  const before = process.memoryUsage.rss()
  let most = before
  const look = setInterval(() => {
    most = Math.max(most, process.memoryUsage.rss())
  }, 10)
  const from = performance.now()
  await work()
  const seconds = (performance.now() - from) / 1000
  clearInterval(look)
  most = Math.max(most, process.memoryUsage.rss())
  return { seconds, moreMegabytes: (most - before) / 1e6, megabytes: most / 1e6 }
}
