import { gzipSync } from 'node:zlib'
import { create } from 'qrcode'
import { openAs } from './people'
import { expect, test } from './watch'
import type { Page } from '@playwright/test'

test.use({ viewport: { width: 820, height: 1180 }, serviceWorkers: 'allow' })

type Scripts = Map<string, number>

/** Compressed bytes of each script that a page asks for before it stands; old browsers' own are not counted. */
async function scriptsOf(page: Page, address: string): Promise<Scripts> {
  const html = await (await page.request.get(address)).text()
  const tags = [...html.matchAll(/<script[^>]*\ssrc="([^"]+\.js)[^>]*>/g)].filter(
    ([tag]) => !/nomodule/i.test(tag),
  )
  const sizes = tags.map(async ([, file]): Promise<[string, number]> => [
    file!,
    gzipSync(await (await page.request.get(file!)).body()).length,
  ])
  return new Map(await Promise.all(sizes))
}

const sum = (scripts: Scripts) => [...scripts.values()].reduce((all, bytes) => all + bytes, 0)

/** Whether one of these scripts can correct the errors of a label: only a decoder does. */
async function haveDecoder(page: Page, files: Iterable<string>): Promise<boolean> {
  const texts = [...files].map(async (file) => (await page.request.get(file)).text())
  return (await Promise.all(texts)).some((text) => text.includes('ReedSolomon'))
}

test('the Bench loads quickly, and a label held before the camera opens its jar', async ({ page }) => {
  const asked = new Set<string>()
  page.on('request', (request) => {
    const { pathname } = new URL(request.url())
    if (pathname.endsWith('.js')) asked.add(pathname)
  })
  await openAs(page, 'jos', '/bench')
  const bench = await scriptsOf(page, '/bench')
  // A page with nothing on it: what the framework itself takes, without anything of the notebook.
  const empty = await scriptsOf(page, '/not-there')
  console.log(`scripts: empty page ${sum(empty)} B, Bench ${sum(bench)} B`)
  expect(sum(empty)).toBeGreaterThan(100_000)
  expect(sum(bench)).toBeGreaterThan(sum(empty))
  expect(sum(bench)).toBeLessThanOrEqual(1.5 * sum(empty))

  // The camera's picture: a label lying askew on a bench, drawn by another program than the application's.
  const day = (await (await page.request.get('/api/bench')).json()) as {
    stations: { jars: { code: string; state: string }[] }[]
  }
  const { code } = day.stations.flatMap((station) => station.jars).find((jar) => jar.state === 'due')!
  const { size, data } = create(code, { errorCorrectionLevel: 'H' }).modules
  await page.evaluate(
    ({ size, dark }) => {
      const canvas = Object.assign(document.createElement('canvas'), { width: 1280, height: 720 })
      const draw = () => {
        const pen = canvas.getContext('2d')!
        pen.fillStyle = '#8a8f8b'
        pen.fillRect(0, 0, 1280, 720)
        pen.save()
        pen.translate(520, 200)
        pen.rotate(0.12)
        pen.fillStyle = '#f4f1e8'
        pen.fillRect(-60, -60, 420, 420)
        pen.fillStyle = '#1c1c1c'
        const side = 300 / size
        dark.forEach((isDark, i) => {
          if (isDark) pen.fillRect((i % size) * side, Math.floor(i / size) * side, side + 0.4, side + 0.4)
        })
        pen.restore()
      }
      draw()
      setInterval(draw, 100)
      navigator.mediaDevices.getUserMedia = () => Promise.resolve(canvas.captureStream(10))
    },
    { size, dark: Array.from(data, (bit) => bit === 1) },
  )
  await page.waitForLoadState('networkidle')
  await page.getByRole('button', { name: 'Scan a label' }).click()
  await expect(page).toHaveURL(new RegExp(`/bench/${code}$`))
  await expect(page.getByRole('heading', { name: new RegExp(code) })).toBeVisible()
  expect(await haveDecoder(page, bench.keys()), 'the Bench stands without the decoder').toBe(false)
  expect(await haveDecoder(page, asked), 'which came after it').toBe(true)
})
