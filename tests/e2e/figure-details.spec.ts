import type { Locator, Page } from '@playwright/test'
import { findTopic } from '@/lib/science/calc/topics'
import { markWords } from '@/lib/science/methods/method'
import { expectAxeClean } from './axe'
import { openAs } from './people'
import { expect, test } from './watch'

// A figure pressed says formula, inputs and source; its input through `calc` gives the figure again.

/** Every panel says how firm its source is, in these words. */
const mark = new RegExp(Object.values(markWords).join('|'))

async function ask(page: Page, figure: RegExp): Promise<Locator> {
  await page.getByRole('button', { name: figure }).first().click()
  const panel = page.getByRole('dialog', { name: figure })
  await expect(panel.getByRole('list', { name: 'Sources' })).toContainText(mark)
  return panel
}

/** What `calc` answers to the input that stands in the panel. */
async function recheck(panel: Locator): Promise<Record<string, unknown>> {
  const input = panel.getByRole('region', { name: /^Input of calc / })
  const name = (await input.getAttribute('aria-label'))!.replace('Input of calc ', '')
  await expect(panel).toContainText(`npm run --silent calc -- ${name}`)
  const topic = (await findTopic(name))!
  return topic.run(JSON.parse((await input.textContent())!)) as Record<string, unknown>
}

/** As the panel writes it, thin gaps and true minus aside. */
const plain = (text: string | null) => (text ?? '').replaceAll('\u2009', '').replaceAll('\u2212', '-')

test('formula: the internal phase is made again to the last digit', async ({ page }) => {
  await openAs(page, 'liv', '/formulas/N86')
  const by = page.getByText('by volume', { exact: false }).getByRole('button', { name: /^What [\d.]+ % is/ })
  await by.first().click()
  const panel = page.getByRole('dialog', { name: /^What [\d.]+ % is computed from$/ })
  await expect(panel).toContainText('packed closest')
  await expect(panel).toContainText('Aqua')
  await expect(panel.getByRole('list', { name: 'Sources' })).toContainText('handbook')
  const { internalVolumePercent } = await recheck(panel)
  expect(plain(await panel.textContent())).toContain(`${String(internalVolumePercent)} %`)
  await expectAxeClean(page, 'the panel', { within: '[role=dialog]' })

  // By keyboard: Escape puts it away, and the figure has the focus again.
  await page.keyboard.press('Escape')
  await expect(panel).toHaveCount(0)
  await expect(by.first()).toBeFocused()
  await page.keyboard.press('Enter')
  await expect(panel).toBeVisible()
})

test('curves: a series names its band, slope, repeatability and rules, and calc stands where it stands', async ({
  page,
}) => {
  await openAs(page, 'liv', '/studies/S-004/curves')
  const panel = await ask(page, /^What Viscosity at 45 °C/)
  await expect(panel).toContainText('p of the slope')
  await expect(panel).toContainText('repeatability SD')
  await expect(panel).toContainText(markWords.memory)
  const { standing, used, slope } = await recheck(panel)
  const text = plain(await panel.textContent())
  expect(text.toLowerCase()).toContain(String(standing))
  expect(text).toContain(String(slope))
  expect(text).toContain(`${String(100 * Number(used))} %`)
  await expectAxeClean(page, 'the panel', { within: '[role=dialog]' })
})

test('flag: the rule stands with its thresholds and the numbers of its day', async ({ page }) => {
  await openAs(page, 'liv', '/studies/S-004')
  await page
    .getByRole('link', { name: /^Answer flag \d+$/ })
    .first()
    .click()
  await page.waitForURL(/\/flags\/\d+$/)
  const panel = await ask(page, /^What flag \d+ is computed from$/)
  await expect(panel).toContainText('Found and kept on')
  await expect(panel).toContainText('npm run simulate')
  await expectAxeClean(page, 'the panel', { within: '[role=dialog]' })
})

test('case: months of an attribute with model, tests, bound and cap, made again from the frozen input', async ({
  page,
}) => {
  await openAs(page, 'rune', '/cases/C-002')
  const panel = await ask(page, /^What pH, .* is computed from$/)
  await expect(panel).toContainText('ICH Q1E, 2003: published standard')
  await expect(panel).toContainText('Frozen')
  await expect(panel).toContainText('F test of the slopes')
  const { batches, model } = (await recheck(panel)) as { batches: { slope: number }[]; model: string }
  const text = plain(await panel.textContent())
  expect(text).toContain(model)
  expect(text).toContain(String(batches[0]!.slope))
  await expectAxeClean(page, 'the panel', { within: '[role=dialog]' })

  await page.keyboard.press('Escape')
  const cap = await ask(page, /^What \d+ months is computed from$/)
  expect(plain(await cap.textContent())).toContain(String((await recheck(cap))['capMonths']))
})
