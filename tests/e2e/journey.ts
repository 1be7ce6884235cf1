import type { Page } from '@playwright/test'
import { Hand } from './hand'
import { expect } from './watch'

// From an idea to labelled jars, as a formulator's hand does it; the story and the empty lab walk the same way.

export type Recipe = {
  code: string
  name: string
  emulsionType: 'water-in-oil' | 'water-in-silicone' | 'oil-in-water'
  /** As a spreadsheet copies it; the q.s. line is one of them. */
  lines: { phase: string; inciName: string; function: string; share: string; density: string }[]
  internalPhase: string
  steps: { phase: string; instruction: string; rpm: string; minutes: string; temperature: string }[]
}

/** What the sheet of the recipe says of a line in % w/w, the q.s. line by hand. */
export function shareOf(recipe: Recipe, inciName: string): number {
  const typed = (share: string) => Number(share.replace(',', '.'))
  const line = recipe.lines.find((one) => one.inciName === inciName)!
  if (line.share !== 'qs') return typed(line.share)
  const others = recipe.lines.filter((one) => one !== line).map((one) => typed(one.share))
  return Math.round((100 - others.reduce((sum, one) => sum + one, 0)) * 100) / 100
}

export async function nameFormula(page: Page, hand: Hand, recipe: Recipe) {
  await hand.press(page.getByRole('link', { name: 'Formulas', exact: true }))
  await hand.press(page.getByRole('link', { name: 'Write a formula' }).first())
  await hand.type(page.getByLabel('Code'), recipe.code)
  await hand.type(page.getByLabel('Name'), recipe.name)
  await hand.choose(page.getByLabel('Emulsion type'), recipe.emulsionType)
  await hand.press(page.getByRole('button', { name: 'Write its lines' }))
  await expect(page).toHaveURL(new RegExp(`/formulas/${recipe.code}$`))
}

export async function pasteLines(page: Page, hand: Hand, recipe: Recipe) {
  const rows = recipe.lines.map((line) =>
    [line.phase, line.inciName, line.function, line.share, line.density].join('\t'),
  )
  const block = ['Phase\tINCI name\tFunction\t% w/w\tg/mL', ...rows].join('\r\n')
  await hand.paste(page.getByRole('combobox', { name: 'INCI name of this line, phase A' }), block)
  await expect(page.getByText(`${rows.length} lines pasted.`)).toBeVisible()
  await hand.press(
    page.getByRole('checkbox', { name: `All of phase ${recipe.internalPhase} is in the internal phase` }),
  )
  await saveDraft(page, hand)
}

export async function writeSteps(page: Page, hand: Hand, recipe: Recipe) {
  await hand.press(page.getByRole('link', { name: /^Process/ }))
  for (const [index, step] of recipe.steps.entries()) {
    await hand.press(page.getByRole('button', { name: 'Add step' }))
    const cell = (what: string) => page.getByRole('textbox', { name: `${what} of step ${index + 1}` })
    await hand.type(cell('phase'), step.phase)
    await hand.type(cell('what is done'), step.instruction)
    await hand.type(cell('rpm'), step.rpm)
    await hand.type(cell('min'), step.minutes)
    await hand.type(cell('°C'), step.temperature)
  }
  await saveDraft(page, hand)
}

export async function saveDraft(page: Page, hand: Hand) {
  const saved = page.waitForResponse((answer) => answer.request().method() === 'PUT')
  await hand.press(page.getByRole('button', { name: 'Save the draft' }))
  expect((await saved).status()).toBe(200)
}

type Making = {
  sizeG: number
  yieldG: number
  typeShown: string
  conductivity: string
  /** Each step was done just so, and says it with one press. */
  isAsPrescribed?: boolean
}

/** From the formula's page to a released batch, each line weighed as asked and each step done as prescribed. */
export async function makeBatch(page: Page, hand: Hand, recipe: Recipe, making: Making): Promise<string> {
  await hand.press(page.getByRole('link', { name: 'Make a batch' }))
  await hand.type(page.getByLabel('Batch size'), String(making.sizeG))
  await hand.press(page.getByRole('button', { name: /^Make [\d\s]+ g$/ }))
  await expect(page).toHaveURL(new RegExp(`/batches/${recipe.code}-\\d$`))
  return keepBatch(page, hand, recipe, making)
}

/** The batch that is open, from its first weight to its release. */
export async function keepBatch(page: Page, hand: Hand, recipe: Recipe, making: Making): Promise<string> {
  for (const { inciName } of recipe.lines) {
    const weight = page.getByRole('textbox', { name: `Weight of ${inciName} in g` })
    await hand.type(weight, ((making.sizeG * shareOf(recipe, inciName)) / 100).toFixed(2))
    await expect(page.getByText('Within what is allowed')).toBeVisible()
    await hand.enter(weight)
  }
  for (const [index, step] of recipe.steps.entries()) {
    const done = page.getByRole('button', { name: `Step ${index + 1} is done` })
    await expect(done).toBeVisible()
    if (making.isAsPrescribed) {
      await hand.press(page.getByRole('button', { name: 'Done as prescribed' }))
      continue
    }
    await hand.type(page.getByLabel('Speed'), step.rpm)
    await hand.type(page.getByLabel('Time'), step.minutes)
    await hand.type(page.getByLabel('Temperature'), step.temperature)
    await hand.press(done)
  }
  await hand.type(page.getByLabel('Yield'), String(making.yieldG))
  await hand.type(page.getByLabel('Jar and closure'), 'screw cap')
  await hand.press(page.getByRole('button', { name: 'Made, let it rest' }))
  await hand.choose(page.getByLabel('Tested by'), 'conductivity')
  await hand.choose(page.getByLabel('It showed'), making.typeShown)
  await hand.type(page.getByLabel('Conductivity'), making.conductivity)
  await hand.press(page.getByRole('button', { name: 'Keep the result' }))
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/, as designed$/)
  await hand.type(page.getByLabel('Reason'), 'The screen starts today.')
  await hand.press(page.getByRole('button', { name: new RegExp(`^Release ${recipe.code}-`) }))
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/ g released for jars$/)
  return decodeURIComponent(new URL(page.url()).pathname.split('/').at(-1)!)
}

export async function takeReadyMade(page: Page, hand: Hand, purpose: string, emulsion: string) {
  await hand.press(page.getByRole('button', { name: 'Take a ready-made one' }))
  const dialog = page.getByRole('dialog')
  await hand.press(dialog.getByRole('radio', { name: purpose }))
  await hand.choose(dialog.getByLabel('On what'), emulsion)
  await hand.press(dialog.getByRole('button', { name: 'Take it' }))
  await expect(dialog).toBeHidden()
}

/** Initial readings of one batch on the page where a study starts, then the start itself and the labels. */
export async function readInitial(
  page: Page,
  hand: Hand,
  readings: { batch: string; ph: string; torque: string }[],
) {
  await hand.choose(page.getByLabel('Instrument for pH'), { index: 1 })
  await hand.choose(page.getByLabel('Instrument for Viscosity'), { index: 1 })
  for (const { batch, ph, torque } of readings) {
    await hand.type(page.getByLabel(`pH of ${batch}`), ph)
    await hand.type(page.getByLabel(`Viscosity of ${batch}`), torque)
  }
}

export async function startIt(page: Page, hand: Hand, title: string) {
  await hand.type(page.getByLabel('Title'), title)
  await hand.press(page.getByRole('button', { name: 'Start the study' }))
  await expect(page).toHaveURL(/\/studies\/S-\d+\/jars$/)
}

/** What the squares on the sheets of labels say, as they leave the printer. */
export async function printLabels(page: Page, hand: Hand): Promise<string[]> {
  await hand.press(page.getByRole('link', { name: 'Print the labels' }))
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^\d+\slabels on /)
  const squares = page.getByRole('img', { name: /^Square of jar [0-9A-Z]{5}$/ })
  await expect(squares.first()).toBeVisible()
  return squares.evaluateAll((drawn) => drawn.map((one) => one.getAttribute('aria-label') ?? ''))
}
