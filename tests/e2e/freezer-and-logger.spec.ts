import type { CycleBoard } from '@/lib/cycle/queries/board'
import { openAs } from './people'
import { expect, test } from './watch'

// At the freezer, where no network reaches, a half that runs is held over the weekend and goes on: the board moves on by
// itself, and each press arrives once. One that is ended short says so before it ends, is corrected, and runs on when its end
// is taken back.
// A logger's file is shown with its bad row, then taken.

test.use({ serviceWorkers: 'allow' })

test('A half is held and ended at the board, and a logger’s file is taken', async ({
  page,
  context,
  watch,
}) => {
  await page.setViewportSize({ width: 820, height: 1180 })
  await openAs(page, 'jos', '/cycles')
  const running = page.getByRole('listitem').filter({ hasText: 'Silicone cream SI82, second batch' })
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/overdue/)
  // A dialog is fetched once the page stands.
  await page.waitForLoadState('networkidle')
  watch.expectNoNetwork()
  await context.setOffline(true)
  await running.getByRole('button', { name: 'Hold it' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'weekend' }).click()
  await dialog.getByRole('button', { name: 'Hold it' }).click()
  await expect(running).toContainText(/held since .*: weekend/)
  await expect(running).toContainText('One entry kept on this device, not sent yet.')
  await running.getByRole('button', { name: 'Go on' }).click()
  await dialog.getByRole('button', { name: 'Go on' }).click()
  await expect(running).not.toContainText('held since')
  await expect(running).toContainText('Two entries kept on this device, not sent yet.')
  await context.setOffline(false)
  await expect(running).not.toContainText('not sent yet', { timeout: 20_000 })
  const { places } = (await (await page.request.get('/api/cycles/board')).json()) as CycleBoard
  const pressed = places.find((place) => place.studyTitle.includes('SI82, second'))!.presses.slice(-2)
  expect(pressed.map((one) => one.press)).toEqual(['hold', 'go on'])

  await running.getByRole('button', { name: /^End the/ }).click()
  await dialog.getByLabel(/^Reached/).fill('-4')
  await expect(dialog).toContainText('−4 °C, −10 °C is asked for')
  await dialog.getByRole('button', { name: 'End it short' }).click()
  await running.getByRole('button', { name: /^All .* halves/ }).click()
  // What a correction brings on is asked about first.
  watch.expectRefusal(/\/api\/cycles\/.*\/correct$/, 409)
  const half = running.getByRole('listitem').filter({ hasText: /^4 cold/ })
  await half.getByRole('button', { name: /^Correct/ }).click()
  await dialog.getByLabel(/^Reached/).fill('-9,5')
  await dialog.getByRole('radio', { name: 'misread' }).click()
  await dialog.getByRole('button', { name: 'Correct it' }).click()
  await dialog.getByRole('button', { name: 'It is so, correct it' }).click()
  await expect(half.getByText('reached −9.5 °C')).toBeVisible()
  await expect(half.getByText('reached −4 °C')).toHaveCSS('text-decoration-line', 'line-through')
  await expect(half).toContainText(/typed .* by Jos .*, because misread/)
  await half.getByRole('button', { name: /^Take back/ }).click()
  await dialog.getByRole('radio', { name: 'It has not ended: it runs on' }).check()
  await dialog.getByRole('radio', { name: 'pressed by mistake' }).click()
  await dialog.getByRole('button', { name: 'Let it run on' }).click()
  await expect(running).toContainText(/The cold half of cycle 4, begun .* by Mada/)

  await page.goto('/stations')
  await page.getByRole('link', { name: 'oven 3' }).click()
  await page.getByRole('button', { name: /logger.s file/ }).click()
  const hour = (hours: number) => new Date(Date.now() - hours * 3_600_000).toISOString().slice(0, 19)
  const rows = [`${hour(5)}Z;45,1`, `${hour(4)}Z;---`, `${hour(3)}Z;45,3`]
  await dialog.getByLabel('File', { exact: true }).setInputFiles({
    name: 'oven-3.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from(`Time;Temperature (°C)\n${rows.join('\n')}\n`),
  })
  await expect(dialog).toContainText('2 new')
  await expect(dialog.getByRole('row', { name: /3 "---" is no temperature/ })).toBeVisible()
  await dialog.getByRole('button', { name: 'Take two temperatures' }).click()
  await expect(page.getByRole('table', { name: /Files taken/ })).toContainText('oven-3.csv')
})
