import type { Locator, Page } from '@playwright/test'
import { demoPassword } from '@/lib/lab/rules'
import { expectAxeClean } from './axe'
import { codeOf, readBalance } from './bench'
import { expect, test } from './watch'

/** Tab, until it is reached: what is not on the way cannot be reached by keyboard at all. */
async function tabTo(page: Page, target: Locator): Promise<void> {
  await expect(target).toBeVisible()
  const isThere = () => target.evaluate((element) => element === document.activeElement)
  for (let presses = 0; presses < 150; presses += 1) {
    if (await isThere()) return
    await page.keyboard.press('Tab')
  }
  throw new Error(`150 presses of Tab do not reach ${target}`)
}

async function signInByKeyboard(page: Page, email: string) {
  await page.goto('/sign-in')
  await expect(page.getByLabel('E-mail')).toBeFocused()
  await page.keyboard.type(email)
  await tabTo(page, page.getByLabel('Password', { exact: true }))
  await page.keyboard.type(demoPassword)
  await page.keyboard.press('Enter')
  await page.waitForURL((url) => url.pathname !== '/sign-in')
}

test('By keyboard alone: sign in, open a study from the ledger, walk its sheet, answer a flag', async ({
  page,
}) => {
  await signInByKeyboard(page, 'liv@fernhollow.example')
  const study = page.getByRole('link', { name: 'S-004', exact: true })
  await tabTo(page, page.getByRole('table', { name: 'Studies' }).getByRole('link').first())
  for (let rows = 0; rows < 10 && !(await study.evaluate((e) => e === document.activeElement)); rows += 1)
    await page.keyboard.press('j')
  await expect(study).toBeFocused()
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/studies\/S-004$/)

  const grid = page.getByRole('grid', { name: /^Sheet of S-004/ })
  await tabTo(page, grid.locator('[tabindex="0"]'))
  const focused = page.locator(':focus')
  await page.keyboard.press('Home')
  await expect(focused).toHaveAccessibleName(/, week 0 /)
  await page.keyboard.press('ArrowRight')
  await expect(focused).toHaveAccessibleName(/, week 1 /)
  const station = (await focused.getAttribute('aria-label'))!.split(',')[0]!
  await page.keyboard.press('ArrowDown')
  await expect(focused).not.toHaveAccessibleName(new RegExp(`^${station},`))
  await expect(focused).toHaveAccessibleName(/, week 1 /)
  await page.keyboard.press('Enter')
  await expect(page.getByRole('group', { name: /^Jar / }).getByText(/^(week|cycle) 1, /)).toBeVisible()

  await tabTo(page, page.getByRole('link', { name: /^Answer flag \d+$/ }).last())
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/flags\/\d+$/)
  const answer = page.getByRole('region', { name: 'Your answer' })
  await tabTo(page, answer.getByRole('radio', { name: /^The product changes/ }))
  await page.keyboard.press('Space')
  await tabTo(page, answer.getByLabel('Why you think so'))
  await page.keyboard.type('The neighbouring stations say the same.')
  await tabTo(page, answer.getByRole('checkbox', { name: 'Keep reading as planned' }))
  await page.keyboard.press('Space')
  await tabTo(page, answer.getByRole('button', { name: /^Answer flag \d+$/ }))
  await page.keyboard.press('Enter')
  await expect(page.getByRole('region', { name: /^Answered/ })).toContainText('The neighbouring stations')
})

test('By keyboard alone: a watch jar is read at the Bench', async ({ page }) => {
  await signInByKeyboard(page, 'jos@fernhollow.example')
  await expect(page).toHaveURL(/\/bench$/)
  await tabTo(page, page.getByRole('button', { name: /look, stays sealed/ }).first())
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/bench\/[0-9A-Z]{5}$/)
  const code = codeOf(page)
  const typed = page.getByLabel('Oil on top', { exact: true })
  await expect(typed).toBeFocused()
  // Enter goes from field to field.
  await page.keyboard.type('0')
  await page.keyboard.press('Enter')
  await page.getByLabel('Water below', { exact: true }).and(page.locator(':focus')).waitFor()
  await page.keyboard.type('0')
  await page.keyboard.press('Enter')
  await tabTo(page, page.getByRole('radio', { name: 'as the initial' }))
  await page.keyboard.press('Space')
  await expect(page.getByLabel('Mass', { exact: true }), 'a word goes on by itself').toBeFocused()
  await page.keyboard.type(await readBalance(page, code))
  await page.keyboard.press('Enter')
  await expect(page.getByRole('button', { name: 'Take a photo' })).toBeVisible()
  await tabTo(page, page.getByRole('button', { name: /^Keep/ }))
  await page.keyboard.press('Enter')
  await expect(page.getByText(/^Kept: /)).toBeVisible()
  await expect(page).not.toHaveURL(new RegExp(`${code}$`))
})

test('By keyboard alone: Control and K find a batch and a page by part of their names, axe clean', async ({
  page,
}) => {
  await signInByKeyboard(page, 'liv@fernhollow.example')
  await page.keyboard.press('Control+k')
  const box = page.getByRole('combobox', { name: 'Part of a name or code' })
  await expect(box).toBeFocused()
  await page.keyboard.type('n86-')
  const batch = page.getByRole('option', { name: /^batch N86-1/ })
  await expect(batch).toHaveAttribute('aria-selected', 'true')
  await expectAxeClean(page, 'finding')
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/batches\/N86-1$/)
  await expect(box).toBeHidden()

  await page.keyboard.press('Control+k')
  await page.keyboard.type('station')
  await expect(page.getByRole('option', { name: /^page Stations/ })).toHaveAttribute('aria-selected', 'true')
  await page.keyboard.press('Escape')
  await expect(box).toBeHidden()
  await expect(page).toHaveURL(/\/batches\/N86-1$/)
})
