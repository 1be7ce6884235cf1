import { openAs } from './people'
import { expect, test } from './watch'

// At the freezer a half that runs is held over the weekend and goes on; one that is ended short says so before it ends.
// A logger's file is shown with its bad row, then taken.

test('A half is held and ended at the board, and a logger’s file is taken', async ({ page }) => {
  await page.setViewportSize({ width: 820, height: 1180 })
  await openAs(page, 'jos', '/cycles')
  const running = page.getByRole('listitem').filter({ hasText: 'Silicone cream SI82, second batch' })
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/overdue/)
  await running.getByRole('button', { name: 'Hold it' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'weekend' }).click()
  await dialog.getByRole('button', { name: 'Hold it' }).click()
  await expect(running).toContainText(/held since .*: weekend/)
  await running.getByRole('button', { name: 'Go on' }).click()
  await dialog.getByRole('button', { name: 'Go on' }).click()
  await expect(running).not.toContainText('held since')

  await running.getByRole('button', { name: /^End the/ }).click()
  await dialog.getByLabel(/^Reached/).fill('-4')
  await expect(dialog).toContainText('−4 °C, −10 °C is asked for')
  await expect(dialog.getByRole('button', { name: 'End it short' })).toBeVisible()
  await dialog.getByRole('button', { name: 'Leave it' }).click()

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
