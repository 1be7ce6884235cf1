import { openAs } from './people'
import { expect, test } from './watch'

test('An oven fails: all of its jars stand in another one, their series said before and labels offered after', async ({
  page,
}) => {
  await openAs(page, 'mada', '/stations')
  await page.getByRole('link', { name: 'oven 3', exact: true }).click()
  const shelves = page.locator('section').filter({ has: page.getByRole('heading', { name: 'Shelves' }) })
  const jars = shelves.getByRole('link', { name: /jar of S-|spare of S-/ })
  await expect(jars.nth(10)).toBeVisible()
  const standing = await jars.count()

  // The map is one stop of the tab key, and the arrows go from jar to jar.
  await jars.first().focus()
  await page.keyboard.press('ArrowRight')
  await expect(jars.nth(1)).toBeFocused()

  await shelves.getByRole('button', { name: 'Move jars' }).click()
  await shelves
    .getByRole('checkbox', { name: /shelf 1, place/ })
    .first()
    .click()
  await expect(shelves.getByText(/^1 of /)).toBeVisible()
  await shelves.getByRole('button', { name: `All ${standing}`, exact: true }).click()
  const target = shelves.getByLabel('To', { exact: true })
  // Where the jars keep their temperature stands first; where they do not, it is said what that means.
  await expect(target.locator('option').nth(1)).toHaveText(/^oven 4, .* as asked$/)
  await target.selectOption({ label: await target.locator('option', { hasText: 'oven 2' }).innerText() })
  await expect(shelves.getByText(/will stand at 40 °C instead of 45 °C/).first()).toBeVisible()
  await target.selectOption({ label: await target.locator('option', { hasText: 'oven 4' }).innerText() })
  await expect(shelves.getByText(/the series goes on/).first()).toBeVisible()
  await shelves.getByLabel('Why', { exact: true }).fill('The fan failed in the night.')
  await shelves.getByRole('button', { name: /^Move / }).click()

  await expect(shelves.getByRole('status')).toContainText('oven 4')
  await expect(shelves.getByText('No jar stands here')).toBeVisible()
  await expect(page.getByRole('row', { name: /oven 3 to oven 4 The fan failed in the night/ })).toBeVisible()
  await shelves.getByRole('link', { name: 'S-004' }).click()
  await expect(page).toHaveURL(/\/studies\/S-004\/labels\?of=moved$/)
  await page.goto('/studies/S-004')
  await expect(page.getByText(/Oven 3 to oven 4: .*45 °C/)).toBeVisible()
})
