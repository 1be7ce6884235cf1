import type { Locator, Page } from '@playwright/test'
import { expectAxeClean } from './axe'
import { codeOf, openStation, readBalance, readLast } from './bench'
import { openAs } from './people'
import { photo } from './picture'
import { expect, test } from './watch'

test.use({ viewport: { width: 820, height: 1180 }, hasTouch: true })

/** Counts what a hand does beyond the digits themselves: a press, an Enter, a photo taken. */
class Count {
  interactions = 0
  constructor(readonly page: Page) {}

  async press(target: Locator) {
    this.interactions += 1
    await target.tap()
  }
  async digits(text: string) {
    for (const key of text)
      await this.page.getByRole('button', { name: key === '.' ? 'Decimal point' : key, exact: true }).tap()
  }
  async enter() {
    this.interactions += 1
    await this.page.keyboard.press('Enter')
  }
  async takePhoto() {
    this.interactions += 1
    await this.page
      .getByLabel('Photo files')
      .first()
      .setInputFiles(await photo())
  }
}

const row = (page: Page, batch: string, asks: string) =>
  page.getByRole('button', { name: new RegExp(`^[0-9A-Z]{5} ?${batch}, .*${asks}`) }).first()

/** Targets that a glove hits: at least 64 px each way, as drawn. */
async function tooSmall(page: Page): Promise<string[]> {
  return page.locator('button:visible, [role=tab]:visible, summary:visible').evaluateAll((all) =>
    all.flatMap((one) => {
      const box = one.getBoundingClientRect()
      const reach = getComputedStyle(one, '::after')
      const isWider = reach.content !== 'none' && reach.position === 'absolute'
      return isWider || (box.width >= 63.5 && box.height >= 63.5)
        ? []
        : [`${one.getAttribute('aria-label') ?? one.textContent}: ${box.width} × ${box.height}`]
    }),
  )
}

test('A watch jar with look, layers, mass and photo takes at most 8 interactions beyond its digits, and is undone with one', async ({
  page,
}) => {
  await openAs(page, 'jos', '/bench')
  await openStation(page, '25')
  const count = new Count(page)
  await count.press(row(page, 'L1-1', 'look, stays sealed'))
  await expect(page).toHaveURL(/\/bench\/[0-9A-Z]{5}$/)
  const code = codeOf(page)
  await expect(page.getByLabel('Oil on top', { exact: true })).toBeFocused()
  expect(await tooSmall(page), 'targets of the jar').toEqual([])
  await count.digits('0')
  await count.enter()
  await count.digits('0')
  await count.enter()
  await count.press(page.getByRole('button', { name: /^Same as last: / }))
  await expect(page.getByLabel('Mass', { exact: true })).toBeFocused()
  await count.digits(await readBalance(page, code))
  await count.enter()
  await count.takePhoto()
  await count.press(page.getByRole('button', { name: /^Keep/ }))
  await expect(page.getByText(/^Kept: /)).toBeVisible()
  await expect(page, 'the next jar is open').not.toHaveURL(new RegExp(`${code}$`))
  expect(count.interactions).toBeLessThanOrEqual(8)

  await page.getByRole('button', { name: /^Undo \d+ s$/ }).tap()
  await expect(page).toHaveURL(new RegExp(`${code}$`))
  await expect(page.getByLabel('Oil on top', { exact: true }), 'what was typed is back').toHaveValue('0')
  const { state, readings } = (await (await page.request.get(`/api/bench/${code}`)).json()) as {
    state: string
    readings: { isVoid: boolean; reason: string | null }[]
  }
  expect(state).toBe('due')
  expect(readings.filter((r) => r.isVoid).map((r) => r.reason)).toEqual(
    Array.from({ length: 3 }, () => 'undone by its author'),
  )
})

test('A measuring jar with pH and viscosity takes at most 6; its keys are in view on phone and tablet, in every light', async ({
  page,
}) => {
  await openAs(page, 'jos', '/bench')
  await openStation(page, '25')
  const count = new Count(page)
  await count.press(row(page, 'L1-1', 'opened once'))
  await expect(page).toHaveURL(/\/bench\/[0-9A-Z]{5}$/)
  const code = codeOf(page)
  for (const [width, height] of [
    [390, 844],
    [1180, 820],
    [820, 1180],
  ] as const) {
    await page.setViewportSize({ width, height })
    for (const name of ['7', '0', 'Delete the last digit']) {
      const box = (await page.getByRole('button', { name, exact: true }).boundingBox())!
      expect(box.y + box.height, `${name} at ${width} × ${height}`).toBeLessThanOrEqual(height)
      expect(box.width).toBeGreaterThanOrEqual(92)
      expect(box.height).toBeGreaterThanOrEqual(64)
    }
  }
  await count.digits((await readLast(page, code, 'ph')).toFixed(2))
  await count.enter()
  await count.digits(((await readLast(page, code, 'viscosity')) / 100).toFixed(1))
  await count.enter()
  // Odour, then feel.
  await count.press(page.getByRole('button', { name: /^Same as last: / }))
  await expect(page.getByRole('tab', { name: /^Feel/ })).toHaveAttribute('aria-selected', 'true')
  await count.press(page.getByRole('button', { name: /^Same as last: / }))
  await page.evaluate(() => document.documentElement.setAttribute('data-theme', 'dim'))
  await expectAxeClean(page, 'dim')
  await count.press(page.getByRole('button', { name: /^Keep/ }))
  await expect(page.getByText(/^Kept: /)).toBeVisible()
  await expect(page, 'the next jar is open').not.toHaveURL(new RegExp(`${code}$`))
  expect(count.interactions).toBeLessThanOrEqual(6)
})
