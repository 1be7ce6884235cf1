import type { Page } from '@playwright/test'
import { demoPeople } from '@/fixtures/demo/people'
import { emptyLab, firstCode } from '../support/e2e-labs'
import { Hand } from './hand'
import {
  keepBatch,
  makeBatch,
  nameFormula,
  pasteLines,
  printLabels,
  readInitial,
  saveDraft,
  startIt,
  takeReadyMade,
  writeSteps,
  type Recipe,
} from './journey'
import { gelledCream, lotion, siliconeCream, siliconeFreeCream } from './recipes'
import { expect, test } from './watch'

test.use({ baseURL: emptyLab.url })
// A lab is begun once, and each of these goes on where the one before left it.
test.describe.configure({ mode: 'serial' })

test('A03, A07: an empty lab is begun with the one-time code of the console, and no press signs in there', async ({
  page,
  watch,
}) => {
  await page.goto('/sign-in')
  await expect(page).toHaveURL(/\/setup$/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/This notebook is empty/)

  await page.getByLabel('Name of the lab').fill('Test bench')
  await page.getByLabel('Time zone of the lab').selectOption('Europe/Berlin')
  await page.getByLabel('Name', { exact: true }).fill('Ansa Rook')
  await expect(page.getByLabel('Initials')).toHaveValue('AR')
  await page.getByLabel('E-mail').fill('ansa@bench.example')
  await page.getByLabel('Password', { exact: true }).fill('oil and water apart')

  watch.expectRefusal(/\/api\/setup$/, 422)
  await page.getByLabel('Code from the server’s console').fill('not-the-code')
  await page.getByRole('button', { name: 'Begin the notebook' }).click()
  await expect(page.getByRole('alert').first()).toBeVisible()

  await page.getByRole('checkbox', { name: /^formulator/ }).check()
  await page.getByLabel('Code from the server’s console').fill(await firstCode())
  await page.getByRole('button', { name: 'Begin the notebook' }).click()
  await expect(page).toHaveURL(/\/people$/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/One person keeps this notebook/)

  await page.goto('/setup')
  await expect(page, 'the door closes behind the first manager').not.toHaveURL(/\/setup$/)
  // An open page would ask once more, and be refused.
  await page.goto('about:blank')
  await page.context().clearCookies()
  await page.goto('/setup')
  await expect(page).toHaveURL(/\/sign-in$/)
  await expect(page.getByLabel('E-mail')).toBeVisible()
  for (const { name } of demoPeople) await expect(page.getByRole('button', { name })).toHaveCount(0)
  const refused = await page.request.post('/api/session', {
    headers: { origin: emptyLab.url, 'idempotency-key': crypto.randomUUID() },
    data: { demoPersonId: crypto.randomUUID() },
  })
  expect(refused.status(), 'one-click sign-in is not there at all').toBeGreaterThanOrEqual(400)
  expect((await page.context().cookies()).length).toBe(0)

  await signIn(page)
})

/** By hand: 4 stations of 1 + 9 + 1 jars, 1 + 5 + 1 in freeze-thaw, 1 for the initial and 2 retained. */
const jarsOfScreen = 54
const labelsOfScreen = jarsOfScreen - 1
/** "In under ten minutes", from an idea to labelled jars. */
const tenMinutes = 600

test('An empty lab gets its stations and instruments', async ({ page }) => {
  await signIn(page)
  await page.getByRole('link', { name: 'Stations', exact: true }).click()
  for (const [name, keeps, low, high] of [
    ['cold cabinet', '5', '3', '7'],
    ['room cabinet', '25', '23', '27'],
    ['oven 1', '40', '38', '42'],
    ['oven 2', '45', '43', '47'],
  ] as const) {
    await addStation(page, name, async (dialog) => {
      await dialog.getByLabel('Temperature, °C').fill(keeps)
      await dialog.getByLabel('At least, °C').fill(low)
      await dialog.getByLabel('At most, °C').fill(high)
    })
  }
  await addStation(page, 'freezer', async (dialog) => {
    await dialog.getByLabel('Keeps').selectOption({ label: 'freeze-thaw cycles' })
    await dialog.getByLabel('Cold half, °C').fill('-10')
    await dialog.getByLabel('Warm half, °C').fill('25')
  })
  await page.getByRole('link', { name: 'Instruments', exact: true }).click()
  await addInstrument(page, 'M1', 'pH meter', [])
  await addInstrument(page, 'V1', 'viscometer', [
    ['T-bar C', '10000'],
    ['T-bar D', '20000'],
    ['disc 4', '2000'],
  ])
})

for (const { title, recipe, emulsion, inside, typeShown, conductivity, ph, torque } of [
  {
    title: 'A silicone-based water-in-oil cream with over 80 % water phase',
    recipe: siliconeCream,
    emulsion: 'high-internal-phase cream',
    inside: /^82\.8 % water inside, past the closest packing$/,
    typeShown: 'water-in-silicone',
    conductivity: '0.3',
    ph: '5,58',
    torque: '62',
  },
  {
    title: 'A silicone-free water-in-oil cream with over 85 % water phase',
    recipe: siliconeFreeCream,
    emulsion: 'stiff high-internal-phase cream',
    inside: /^87\.1 % water inside, past the closest packing$/,
    typeShown: 'water-in-oil',
    conductivity: '0.2',
    ph: '5.31',
    torque: '45',
  },
  {
    title: 'A plain lotion',
    recipe: lotion,
    emulsion: 'oil-in-water lotion',
    inside: /^13\.1 % oil inside, drops with room between$/,
    typeShown: 'oil-in-water',
    conductivity: '1200',
    ph: '5.50',
    torque: '65',
  },
]) {
  test(`${title} goes from an empty lab to labelled jars in under ten minutes`, async ({ page }) => {
    const hand = new Hand()
    await signIn(page)
    await nameFormula(page, hand, recipe)
    await pasteLines(page, hand, recipe)
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(inside)
    await writeSteps(page, hand, recipe)
    const batch = await makeBatch(page, hand, recipe, { sizeG: 2000, yieldG: 1950, typeShown, conductivity })
    await hand.press(page.getByRole('link', { name: 'Start a study on it' }))
    await expect(page.getByRole('checkbox', { name: new RegExp(`^${batch} `) })).toBeChecked()
    await takeReadyMade(page, hand, 'Prototype screen, 12 weeks', emulsion)
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(`${jarsOfScreen} jars will stand`)
    await readInitial(page, hand, [{ batch, ph, torque }])
    await startIt(page, hand, `${recipe.name}, screen`)
    expect(new Set(await printLabels(page, hand)).size).toBe(labelsOfScreen)
    expect(hand.seconds, 'seconds of an experienced hand').toBeLessThan(tenMinutes)
  })
}

test('A family of six variants goes from one base to labelled jars in under ten minutes', async ({
  page,
}) => {
  test.slow()
  const hand = new Hand()
  await signIn(page)
  await nameFormula(page, hand, gelledCream)
  await pasteLines(page, hand, gelledCream)
  await hand.press(page.getByRole('link', { name: /^Process/ }))
  await hand.press(page.getByRole('button', { name: 'Take steps from a formula' }))
  await hand.type(page.getByRole('dialog').getByLabel('Find a formula'), 'W88')
  await hand.press(page.getByRole('dialog').getByRole('radio', { name: /^W88 / }))
  await hand.press(page.getByRole('dialog').getByRole('button', { name: 'Take its steps' }))
  await saveDraft(page, hand)
  await hand.press(page.getByRole('link', { name: 'Vary it' }))
  await hand.choose(page.getByLabel('Vary', { exact: true }), { label: 'B  Xanthan Gum, 0.20 %' })
  await hand.type(page.getByLabel('Over the levels, % w/w'), '0,2; 0,3; 0,4')
  await hand.choose(page.getByLabel('And with it'), { label: 'B  Magnesium Sulfate, 0.70 %' })
  await hand.type(page.getByLabel('Over its levels, % w/w'), '0,5; 0,9')
  await hand.press(page.getByRole('button', { name: 'Make six formulas' }))
  await expect(page).toHaveURL(/\/formulas\/G80a$/)

  await hand.press(page.getByRole('button', { name: 'A batch of each' }))
  await hand.press(page.getByRole('dialog').getByRole('button', { name: 'Make them' }))
  await expect(page).toHaveURL(/\/batches\?q=G80$/)
  const batches: string[] = []
  for (const [index, letter] of [...'abcdef'].entries()) {
    const variant = variantOf(
      gelledCream,
      letter,
      ['0.2', '0.3', '0.4'][Math.floor(index / 2)]!,
      ['0.5', '0.9'][index % 2]!,
    )
    if (index > 0)
      await hand.press(page.getByRole('navigation').getByRole('link', { name: 'Batches', exact: true }))
    await hand.press(page.getByRole('link', { name: `${variant.code}-1`, exact: true }))
    const making = {
      sizeG: 2000,
      yieldG: 1950,
      typeShown: 'water-in-oil',
      conductivity: '0.2',
      isAsPrescribed: true,
    }
    batches.push(await keepBatch(page, hand, variant, making))
  }
  await hand.press(page.getByRole('link', { name: 'Start a study on it' }))
  for (const batch of batches.slice(0, -1))
    await hand.press(page.getByRole('checkbox', { name: new RegExp(`^${batch} `) }))
  await hand.choose(page.getByLabel('Protocol', { exact: true }), { index: 1 })
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(`${6 * jarsOfScreen} jars will stand`)
  await readInitial(
    page,
    hand,
    batches.map((batch, index) => ({ batch, ph: `5.3${index}`, torque: `6${index}` })),
  )
  await startIt(page, hand, 'Gelled cream, family of six')
  expect(new Set(await printLabels(page, hand)).size).toBe(6 * labelsOfScreen)
  expect(hand.seconds, 'seconds of an experienced hand').toBeLessThan(tenMinutes)
})

async function signIn(page: Page) {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill('ansa@bench.example')
  await page.getByLabel('Password', { exact: true }).fill('oil and water apart')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL((url) => url.pathname !== '/sign-in')
}

async function addStation(
  page: Page,
  name: string,
  keeps: (dialog: ReturnType<Page['getByRole']>) => Promise<void>,
) {
  await page.getByRole('button', { name: 'Add a station' }).first().click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Name').fill(name)
  await keeps(dialog)
  await dialog.getByLabel('Places on each').fill('60')
  await dialog.getByRole('button', { name: 'Add it' }).click()
  await expect(page.getByRole('link', { name }).first()).toBeVisible()
}

async function addInstrument(page: Page, code: string, kind: string, spindles: [string, string][]) {
  await page.getByRole('button', { name: 'Add an instrument' }).first().click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Code').fill(code)
  await dialog.getByLabel('Name').fill(kind)
  await dialog.getByLabel('Kind').selectOption({ label: kind })
  for (const [index, [spindle, constant]] of spindles.entries()) {
    await dialog.getByRole('button', { name: 'Add a spindle' }).click()
    await dialog.getByLabel(`Spindle ${index + 1}`).fill(spindle)
    await dialog.getByLabel('Constant').nth(index).fill(constant)
  }
  await dialog.getByRole('button', { name: 'Add it' }).click()
  await expect(page.getByRole('link', { name: code, exact: true })).toBeVisible()
}

function variantOf(base: Recipe, letter: string, gum: string, salt: string): Recipe {
  const levels: Record<string, string> = { 'Xanthan Gum': gum, 'Magnesium Sulfate': salt }
  const lines = base.lines.map((line) => ({ ...line, share: levels[line.inciName] ?? line.share }))
  return { ...base, code: `${base.code}${letter}`, lines }
}
