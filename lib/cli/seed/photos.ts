import { createHash } from 'node:crypto'
import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Jimp } from 'jimp'
import { newId } from '@/lib/db/id'
import { addPhoto } from '@/lib/photo/commands/add-photo'
import type { Filling } from './context'
import type { Noise } from './noise'

const size = { width: 360, height: 640 }
const most = 72

/** Photos of one study's watch jars, drawn from the layers that were read: one light, one scale. */
export async function fillPhotos(filling: Filling, studyId: string): Promise<void> {
  const { mada } = filling.people
  const rows = await filling.db
    .selectFrom('pullJar as pj')
    .innerJoin('reading as r', 'r.pullJarId', 'pj.id')
    .select(['pj.id', 'r.detail', 'r.measuredAt'])
    .where('pj.studyId', '=', studyId)
    .where('pj.asks', '=', 'watch')
    .where('r.attribute', '=', 'separation')
    .orderBy('r.measuredAt')
    .limit(most)
    .execute()
  const folder = await mkdtemp(path.join(tmpdir(), 'stillstand-demo-'))
  try {
    for (const row of rows) {
      const { topMm, bottomMm, totalMm } = row.detail as { topMm: number; bottomMm: number; totalMm: number }
      const bytes = await drawJar(topMm / totalMm, bottomMm / totalMm, filling.noise)
      const file = path.join(folder, `${row.id}.jpg`)
      await writeFile(file, bytes)
      const at = new Date(Date.parse(row.measuredAt) + 60_000)
      await filling.act(mada, at, (trx, now) =>
        addPhoto(
          trx,
          mada,
          {
            path: file,
            sha256: createHash('sha256').update(bytes).digest('hex'),
            bytes: bytes.length,
            type: 'image/jpeg',
            originalName: 'jar.jpg',
          },
          null,
          {
            id: newId(),
            shows: 'jar',
            pullJarId: row.id,
            deviceNow: at.toISOString(),
            claimedAt: at.toISOString(),
          },
          now,
        ),
      )
    }
  } finally {
    await rm(folder, { recursive: true, force: true })
  }
}

type Colour = [number, number, number]

/** A jar on a dark bench: glass, black lid, cream, ochre oil above and grey-blue serum below. */
async function drawJar(top: number, bottom: number, noise: Noise): Promise<Buffer> {
  const image = new Jimp({ ...size, color: 0x000000ff })
  const { data } = image.bitmap
  const [left, right, lidTop, lidFoot, fillTop, foot] = [92, 268, 84, 150, 176, 560]
  const oilFoot = fillTop + top * (foot - fillTop)
  const waterTop = foot - bottom * (foot - fillTop)
  for (let y = 0; y < size.height; y += 1) {
    for (let x = 0; x < size.width; x += 1) {
      const across = (x - left) / (right - left)
      // Darker to the sides: a round jar in light from the front.
      const round = 1 - 0.42 * (2 * across - 1) ** 4 - 0.1 * (2 * across - 1) ** 2
      let colour: Colour = y > foot + 8 ? [38, 42, 40] : [84 - y / 16, 92 - y / 16, 88 - y / 16]
      if (y >= lidTop && y < lidFoot && x >= left - 6 && x < right + 6)
        colour = shade([28, 34, 32], round + 0.1)
      else if (y >= lidFoot && y < foot + 8 && x >= left - 5 && x < right + 5) {
        const isInside = x >= left && x < right && y < foot
        if (!isInside) colour = shade([150, 160, 156], round)
        else if (y < fillTop) colour = shade([176, 184, 178], round)
        else if (y < oilFoot) colour = shade([214, 164, 58], round)
        else if (y >= waterTop) colour = shade([140, 164, 176], round)
        else colour = shade([243, 238, 224], round)
      }
      const grain = (noise.uniform() - 0.5) * 9
      const at = (y * size.width + x) * 4
      for (let c = 0; c < 3; c += 1) data[at + c] = Math.max(0, Math.min(255, colour[c]! + grain))
      data[at + 3] = 255
    }
  }
  return image.getBuffer('image/jpeg', { quality: 82 })
}

function shade([r, g, b]: Colour, by: number): Colour {
  return [r * by, g * by, b * by]
}
