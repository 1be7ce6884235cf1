import type { Page } from '@playwright/test'
import { Hand } from '../hand'
import { makeBatch, printLabels, takeReadyMade, type Recipe } from '../journey'
import { pressIn } from '../people'
import { expect, test } from '../watch'

/** A silicone-free water-in-oil cream with 88 % water phase; "qs" fills up to 100. */
const lines: [phase: 'A' | 'B', name: string, share: string][] = [
  ['A', 'PEG-30 Dipolyhydroxystearate', '3'],
  ['A', 'Caprylic/Capric Triglyceride', '6'],
  ['A', 'Isoamyl Laurate', '3'],
  ['B', 'Aqua', 'qs'],
  ['B', 'Glycerin', '5'],
  ['B', 'Magnesium Sulfate', '0.7'],
  ['B', 'Phenoxyethanol', '0.8'],
]
/** As it stands once it is typed: what its batches are weighed and stirred by. */
const recipe: Recipe = {
  ...{ code: 'W88', name: 'silicone-free cream', emulsionType: 'water-in-oil', internalPhase: 'B' },
  lines: lines.map(([phase, inciName, share]) => ({ phase, inciName, share, function: '', density: '' })),
  steps: [1, 2].map(() => ({ phase: '', instruction: '', rpm: '310', minutes: '44', temperature: '27.5' })),
}
const made = { typeShown: 'water-in-oil', conductivity: '0.4' }
const hand = new Hand()

/** By hand: 86.77 mL inside of 99.80 mL. */
const insideVolume = '86.9 %'
/** By hand: 4 stations of 1 + 9 + 1 jars, 1 + 5 + 1 in freeze-thaw, 1 for the initial and 2 retained, 30 g each. */
const jars = 54
const gramsNeeded = (jars * 30) / 0.97

test('The story, formulator: from a formula by batch and protocol to standing jars with labels', async ({
  page,
}) => {
  await pressIn(page, 'liv')
  await expect(page).toHaveURL(/\/studies$/)
  await test.step('writes a formula and sees what is inside while typing', () => writeFormula(page))
  await test.step('makes two batches', async () => {
    await makeBatch(page, hand, recipe, { ...made, sizeG: 1000, yieldG: 950 })
    await page.getByRole('link', { name: 'silicone-free cream, version 1' }).click()
    await makeBatch(page, hand, recipe, { ...made, sizeG: 1900, yieldG: 1850 })
  })
  await test.step('takes a ready-made protocol', async () => {
    await page.getByRole('link', { name: 'Protocols', exact: true }).click()
    await takeReadyMade(page, hand, 'Prototype screen, 12 weeks', 'high-internal-phase cream')
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(/: 54 jars a batch$/)
  })
  await test.step('is refused what the batch cannot fill, then starts', () => startStudy(page))
  // The jar opened for the initial needs none.
  await test.step('prints the labels', async () => {
    expect(new Set(await printLabels(page, hand)).size).toBe(jars - 1)
  })
})

async function writeFormula(page: Page) {
  await page.getByRole('link', { name: 'Formulas', exact: true }).click()
  await page.getByRole('link', { name: 'Write a formula' }).click()
  await page.getByLabel('Code').fill('W88')
  await page.getByLabel('Name').fill('silicone-free cream')
  await page.getByLabel('Emulsion type').selectOption('water-in-oil')
  await page.getByRole('button', { name: 'Write its lines' }).click()
  await expect(page).toHaveURL(/\/formulas\/W88$/)
  const finding = page.getByRole('heading', { level: 1 })
  for (const [index, [phase, name, share]] of lines.entries()) {
    if (index > 0)
      await page
        .getByRole('button', { name: new RegExp(`^Add (line to )?phase ${phase}$`) })
        .first()
        .click()
    await page.getByRole('combobox', { name: `INCI name of this line, phase ${phase}` }).fill(name)
    await page.getByRole('option', { name: new RegExp(`^${name.replaceAll('/', '\\/')}`) }).click()
    if (phase === 'B') await page.getByRole('checkbox', { name: `${name} is in the internal phase` }).check()
    await page.getByRole('textbox', { name: `% w/w of ${name}`, exact: true }).fill(share)
    if (index === 2) await expect(page.getByText('88.00 % missing to 100', { exact: true })).toBeVisible()
    if (index === 3) await expect(finding).toHaveText(/% water inside, past the closest packing$/)
  }
  await expect(finding).toHaveText(`${insideVolume} water inside, past the closest packing`)
  await expect(page.getByText(/^Inside:/)).toHaveText(/, 88\.0 % by mass;/)
  await save(page)
  await page.getByRole('link', { name: /^Process/ }).click()
  for (const [number, phase, instruction] of [
    [1, 'B into A', 'Add the water slowly under low shear.'],
    [2, '', 'Go on stirring until smooth.'],
  ] as const) {
    await page.getByRole('button', { name: 'Add step' }).click()
    await page.getByRole('textbox', { name: `phase of step ${number}` }).fill(phase)
    await page.getByRole('textbox', { name: `what is done of step ${number}` }).fill(instruction)
    await page.getByRole('textbox', { name: `rpm of step ${number}` }).fill('300')
  }
  await save(page)
}

async function save(page: Page) {
  const saved = page.waitForResponse((answer) => answer.request().method() === 'PUT')
  await page.getByRole('button', { name: 'Save the draft' }).click()
  expect((await saved).status()).toBe(200)
}

async function startStudy(page: Page) {
  await page.getByRole('link', { name: 'Start a study' }).click()
  const finding = page.getByRole('heading', { level: 1 })
  const start = page.getByRole('button', { name: 'Start the study' })
  await page.getByRole('checkbox', { name: /^W88-1 / }).check()
  const missing = Math.ceil(gramsNeeded - 950)
  await expect(finding).toHaveText(`${missing} g are missing, so this study cannot start`)
  await expect(start).toHaveAttribute('aria-disabled', 'true')
  await expect(start).toHaveAccessibleDescription(`${missing} g short.`)

  await page.getByRole('checkbox', { name: /^W88-1 / }).uncheck()
  await page.getByRole('checkbox', { name: /^W88-2 / }).check()
  await expect(finding).toHaveText('54 jars will stand')
  await page.getByLabel('Title').fill('Silicone-free cream W88, screen')
  await page.getByLabel('Instrument for pH').selectOption({ index: 1 })
  await page.getByLabel('pH of W88-2').fill('5,42')
  await page.getByLabel('Instrument for Viscosity').selectOption({ index: 1 })
  await page.getByLabel('Viscosity of W88-2').fill('61.5')
  // 61.5 % of the 100 000 mPa·s that T-bar C reaches at 10 rpm.
  await expect(page.getByText(/^61.500 mPa·s$/)).toBeVisible()
  await start.click()
  await expect(page).toHaveURL(/\/studies\/S-\d+\/jars$/)
  // One was opened for the initial, two are retained elsewhere.
  await expect(finding).toHaveText(/^51\sof\s54\sjars\sstill\sstand/)
}
