import { openAs } from './people'
import { expect, test } from './watch'

test('formula: an open question is answered with a note, and says by whom', async ({ page, watch }) => {
  watch.expectRefusal(/\/answers$/, 422)
  await openAs(page, 'liv', '/formulas/SI80')
  const question = page.getByRole('button', { name: 'Does the preservative work at the target pH?' })
  await expect(page.getByText(/^Open: no target pH is given/)).toBeVisible()
  await question.click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'Keep the answer' }).click()
  await expect(dialog.getByText(/^Say why in a few words/)).toBeVisible()
  await dialog.getByLabel('Note').fill('As the brief asks, by extract.')
  await dialog.getByRole('button', { name: 'Keep the answer' }).click()
  await expect(dialog).toBeHidden()
  await expect(page.getByText(/^Answered by LB: As the brief asks, by extract\./)).toBeVisible()
  await question.click()
  await expect(dialog.getByText(/^LB, .* 20\d\d, answered: As the brief asks, by extract\.$/)).toBeVisible()
})

test('ingredients: found by a synonym, changed, and the book says who did', async ({ page, watch }) => {
  watch.expectRefusal(/\/api\/ingredients\//, 422)
  await openAs(page, 'liv', '/ingredients')
  await page.getByRole('searchbox', { name: 'Find an ingredient' }).fill('evening primrose')
  await expect(page).toHaveURL(/q=evening/)
  await expect(page.getByText('also Evening primrose oil')).toBeVisible()
  await page.getByRole('button', { name: 'Oenothera Biennis Oil' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('to, % w/w').fill('0,1')
  await dialog.getByRole('button', { name: 'Keep the change' }).click()
  await expect(dialog.getByLabel('to, % w/w')).toHaveAccessibleDescription(
    /The highest share is below the lowest/,
  )
  await dialog.getByLabel('to, % w/w').fill('6,5')
  await dialog.getByRole('button', { name: 'Keep the change' }).click()
  await expect(dialog).toBeHidden()
  await expect(page.getByRole('cell', { name: '0.50 to 6.50' })).toBeVisible()
  await page.getByRole('button', { name: 'Oenothera Biennis Oil' }).click()
  await expect(dialog.getByText(/^Changed last by/)).toBeVisible()
})
