import type { Locator, Page } from '@playwright/test'
import { openAs } from './people'
import { expect, test } from './watch'

/** As a spreadsheet copies it: a head row, tabs, decimal commas, a sum. */
const block = [
  'Phase\tINCI name\tFunction\t% w/w\tg/mL\tper kg',
  'A\tPEG-30 Dipolyhydroxystearate\tpolymeric emulsifier\t3,00\t0,94\t18,50',
  'A\tSqualane\toil\t9,00\t0,81\t21,00',
  'B\tAqua\twater\tq.s.\t0,998\t0,02',
  'B\tGlycerin\thumectant\t5,0 %\t1,261\t1,60',
  'B\tMagnesium Sulfate\telectrolyte\t0,70\t1,68\t0,90',
  'B\tXanthan Gum\tgels the water\t0,20\t1,50\t14,00',
  '\tTotal\t\t100',
].join('\r\n')

test('A family of six variants from one base, by keyboard and mouse, and its difference', async ({
  page,
}) => {
  await openAs(page, 'liv', '/formulas/new')
  await page.getByLabel('Code').fill('W77')
  await page.getByLabel('Name').fill('cold cream')
  await page.getByLabel('Emulsion type').selectOption('water-in-oil')
  await page.getByRole('button', { name: 'Write its lines' }).click()
  await expect(page).toHaveURL(/\/formulas\/W77$/)

  const finding = page.getByRole('heading', { level: 1 })
  const share = (name: string) => page.getByRole('textbox', { name: `% w/w of ${name}`, exact: true })

  await test.step('pastes the lines, and what is no line is named', async () => {
    await paste(page.getByRole('combobox', { name: 'INCI name of this line, phase A' }), block)
    await expect(page.getByText('6 lines pasted.')).toBeVisible()
    await expect(page.getByText('One row was left out, without a name or a share: Total 100.')).toBeVisible()
    await expect(share('Aqua')).toHaveValue('82.10')
    for (const name of ['Aqua', 'Glycerin', 'Magnesium Sulfate', 'Xanthan Gum'])
      await page.getByRole('checkbox', { name: `${name} is in the internal phase` }).check()
    // By hand: 86.00 mL of water phase in 100.30 mL.
    await expect(finding).toHaveText(/^85\.\d % water inside, past the closest packing$/)
  })

  await test.step('takes typing back and does it again, over cells', async () => {
    await share('Glycerin').fill('6')
    await share('Squalane').fill('8')
    await expect(share('Aqua')).toHaveValue('82.10')
    await page.keyboard.press('Control+z')
    await expect(share('Squalane')).toHaveValue('9,00')
    await page.keyboard.press('Control+z')
    await expect(share('Glycerin')).toHaveValue('5,0')
    await page.keyboard.press('Control+Shift+z')
    await expect(share('Glycerin')).toHaveValue('6')
    await page.getByRole('button', { name: 'Undo' }).click()
    await expect(share('Glycerin')).toHaveValue('5,0')
  })

  await test.step('moves lines by key and by hand, and loses nothing on a reload', async () => {
    await share('Glycerin').focus()
    await page.keyboard.press('Alt+ArrowUp')
    await expect
      .poll(() => names(page))
      .toEqual(order('Glycerin', 'Aqua', 'Magnesium Sulfate', 'Xanthan Gum'))
    await drag(page, 'Xanthan Gum', 'Glycerin')
    await expect
      .poll(() => names(page))
      .toEqual(order('Xanthan Gum', 'Glycerin', 'Aqua', 'Magnesium Sulfate'))
    await page.reload()
    await expect(page.getByText('What you typed before the reload is still here')).toBeVisible()
    expect(await names(page)).toEqual(order('Xanthan Gum', 'Glycerin', 'Aqua', 'Magnesium Sulfate'))
    const saved = page.waitForResponse((answer) => answer.request().method() === 'PUT')
    await page.keyboard.press('Control+s')
    expect((await saved).status()).toBe(200)
  })

  await test.step('varies two ingredients; what does not fit is said before it is made', async () => {
    await page.getByRole('link', { name: 'Vary it' }).click()
    const vary = page.getByLabel('Vary', { exact: true })
    await expect(vary).toBeFocused()
    await vary.selectOption({ label: 'B  Xanthan Gum, 0.20 %' })
    await page.keyboard.press('Tab')
    await page.keyboard.type('0,2; 0,3; 95')
    await expect(
      page.getByText(/does not fit: the q\.s\. to 100 line would go 12\.70 % below 0/),
    ).toBeVisible()
    await expect(page.getByRole('button', { name: 'Make three formulas' })).toHaveAttribute(
      'aria-disabled',
      'true',
    )
    await page.keyboard.press('Backspace')
    await page.keyboard.press('Backspace')
    await page.keyboard.type('0,4')
    await page.keyboard.press('Tab')
    await page.getByLabel('And with it').selectOption({ label: 'B  Magnesium Sulfate, 0.70 %' })
    await page.keyboard.press('Tab')
    await page.keyboard.type('0.5 0.9')
    const code = page.getByRole('textbox', { name: /^Code of/ })
    await expect(code).toHaveCount(6)
    await expect(code.last()).toHaveValue('W77f')
    // 100 − 3 − 9 − 5 − 0.4 − 0.9
    await expect(page.getByRole('row').last()).toContainText('81.70')
    await page.getByRole('button', { name: 'Make six formulas' }).click()
    await expect(page).toHaveURL(/\/formulas\/W77a$/)
    const family = page.getByRole('region', { name: 'Family grid' })
    await expect(family.getByRole('link')).toHaveText(['W77a', 'W77b', 'W77c', 'W77d', 'W77e', 'W77f'])
    await family.getByRole('link', { name: 'W77f' }).click()
    await expect(page).toHaveURL(/\/formulas\/W77f$/)
  })

  await test.step('reads the difference to the base, and compares the family', async () => {
    await page.getByRole('link', { name: 'Difference to the base' }).click()
    await expect(page).toHaveURL(/\/formulas\/W77\/difference\?/)
    await expect(finding).toHaveText(/^\d+\.\d % water inside/)
    const row = (name: RegExp) => page.getByRole('row', { name })
    await expect(row(/Xanthan Gum/)).toContainText(/0\.20.*0\.40.*\+0\.20 %/)
    await expect(row(/Magnesium Sulfate/)).toContainText(/0\.70.*0\.90.*\+0\.20 %/)
    await expect(row(/Aqua/)).toContainText(/82\.10.*81\.70.*−0\.40 %/)
    await expect(row(/^total/)).toContainText('same')
    await page.goBack()
    await page.getByRole('link', { name: 'Compare where they stand' }).click()
    await expect(finding).toHaveText('Too early to tell seven formulas apart')
    await expect(page.getByRole('columnheader')).toHaveCount(7)
  })
})

const order = (...inWater: string[]) => ['PEG-30 Dipolyhydroxystearate', 'Squalane', ...inWater]

const names = (page: Page) =>
  page
    .getByRole('combobox', { name: /^INCI name/ })
    .evaluateAll((fields) => fields.map((field) => (field as HTMLInputElement).value))

/** As Ctrl V does it; the clipboard itself belongs to whoever runs the test. */
const paste = (field: Locator, text: string) =>
  field.evaluate((element, data) => {
    element.focus()
    const clipboardData = new DataTransfer()
    clipboardData.setData('text/plain', data)
    element.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }))
  }, text)

async function drag(page: Page, name: string, before: string) {
  const grip = await page.getByTitle(`Drag ${name}`).boundingBox()
  const target = await page.getByTitle(`Drag ${before}`).boundingBox()
  await page.mouse.move(grip!.x + 10, grip!.y + 16)
  await page.mouse.down()
  await page.mouse.move(target!.x + 10, target!.y + 20, { steps: 4 })
  await page.mouse.move(target!.x + 10, target!.y + 2)
  await page.mouse.up()
}
