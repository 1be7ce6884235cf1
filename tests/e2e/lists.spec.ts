import { readFile } from 'node:fs/promises'
import Papa from 'papaparse'
import readWorkbook from 'read-excel-file/node'
import { openAs } from './people'
import { expect, test } from './watch'

test('a list: columns are chosen, a page is turned and gone back from, files hold what is searched for', async ({
  page,
}) => {
  await openAs(page, 'liv', '/ingredients')
  const table = page.getByRole('table', { name: 'Ingredients' })
  const first = await table.getByRole('row').nth(1).textContent()

  await page.getByRole('button', { name: 'Columns' }).click()
  const dialog = page.getByRole('dialog', { name: 'Columns of this list' })
  await dialog.getByRole('checkbox', { name: 'Also called' }).check()
  await dialog.getByRole('checkbox', { name: 'Per kg' }).uncheck()
  await dialog.getByRole('button', { name: 'Show these' }).click()
  await expect(table.getByRole('columnheader', { name: 'also called' })).toBeVisible()
  await expect(table.getByRole('columnheader', { name: 'per kg' })).toHaveCount(0)
  await expect(page).toHaveURL(/columns=/)

  await page.getByRole('link', { name: 'Next page' }).click()
  await expect(page).toHaveURL(/after=/)
  await expect(page.getByText(/^51 to 100 of /)).toBeVisible()
  await expect(table.getByRole('columnheader', { name: 'also called' })).toBeVisible()
  await page.goBack()
  await expect(page.getByText(/^1 to 50 of /)).toBeVisible()
  expect(await table.getByRole('row').nth(1).textContent()).toContain(first?.slice(0, 6))

  await page.getByRole('searchbox', { name: 'Find an ingredient' }).fill('gly')
  await expect(page).toHaveURL(/q=gly/)
  const shown = await table.getByRole('row').count()
  const take = async (format: string) => {
    const waiting = page.waitForEvent('download')
    await page.getByRole('link', { name: `Export the ingredients as ${format}` }).click()
    const file = await waiting
    expect(file.suggestedFilename()).toMatch(/^ingredients-\d{4}-\d\d-\d\d\.(csv|xlsx)$/)
    return readFile(await file.path())
  }
  const csv = Papa.parse<string[]>((await take('CSV')).toString().slice(1).trimEnd()).data
  expect(csv[0]).toEqual(expect.arrayContaining(['INCI name', 'also called']))
  expect(csv).toHaveLength(shown)
  const [sheet] = (await readWorkbook(await take('XLSX'))) as unknown as { data: unknown[][] }[]
  expect(sheet!.data[0]).toEqual(csv[0])
  expect(sheet!.data[1]![0]).toBe(csv[1]![0])
})
