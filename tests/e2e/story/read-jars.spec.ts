import { openJar, openStation, pick, readBalance, readLast } from '../bench'
import { pressIn } from '../people'
import { photo } from '../picture'
import { expect, test } from '../watch'

test.use({ viewport: { width: 820, height: 1180 }, hasTouch: true })

test('The story, technician: a watch jar is looked at, measured in layers, weighed and photographed', async ({
  page,
}) => {
  await pressIn(page, 'mada')
  await expect(page).toHaveURL(/\/bench$/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^\d+ of \d+ jars$/)
  const code = await openJar(page, '40', 'SI82-2', 'look, stays sealed')

  const more = page.getByRole('button', { name: 'Oil on top: 0.1 mm more' })
  await more.tap()
  await more.tap()
  await page.getByRole('button', { name: 'Water below: 0.1 mm more' }).tap()
  await page.getByRole('button', { name: 'Water below: 0.1 mm less' }).tap()
  await expect(
    page.getByRole('img', { name: 'The jar: fill 40 mm, oil on top 0.2 mm, water below 0.0 mm' }),
  ).toBeVisible()
  await expect(page.getByText('inside', { exact: true })).toBeVisible()

  await pick(page, /^Look/)
  await page.getByRole('radio', { name: 'as the initial' }).tap()
  await pick(page, /^Mass/)
  for (const key of await readBalance(page, code))
    await page.getByRole('button', { name: key === '.' ? 'Decimal point' : key, exact: true }).tap()
  await pick(page, /^Photo/)
  await page
    .getByLabel('Photo files')
    .first()
    .setInputFiles(await photo())
  await expect(page.getByRole('img', { name: new RegExp(`^Jar ${code}, `) }).first()).toBeVisible()

  await page.getByRole('button', { name: /^Keep/ }).tap()
  await expect(page.getByText(/^Kept: /)).toBeVisible()
  await expect(page, 'the next jar comes up').not.toHaveURL(new RegExp(`${code}$`))
  await page.goto('/bench')
  await openStation(page, '40')
  await expect(page.getByRole('button', { name: new RegExp(`^${code} .*read by MA`) })).toBeVisible()
})

test('The story, technician: R08, R11: a measuring jar takes its numbers, refuses what cannot be, doubts what hardly is', async ({
  page,
  watch,
}) => {
  await pressIn(page, 'mada', '/bench')
  const code = await openJar(page, '5', 'SI82-2', 'opened once')
  const typed = page.locator('#typed')

  await pick(page, /^pH/)
  await typed.fill('54.1')
  await expect(page.getByText(/^pH runs from 0 to 14\./)).toBeVisible()
  await expect(typed).toHaveAttribute('aria-invalid', 'true')
  await expect(page.getByRole('button', { name: 'Keep', exact: true })).toHaveAttribute(
    'aria-disabled',
    'true',
  )
  // Far outside of 5.6 ± 0.5, and no pull before led there.
  await typed.fill('6,80')
  await expect(page.getByText(/above the band\.$/)).toBeVisible()

  await pick(page, /^Viscosity/)
  // T-bar C at 10 rpm: a hundredth of full torque is 1000 mPa·s.
  await typed.fill(((await readLast(page, code, 'viscosity')) / 1000).toFixed(1))
  await expect(page.getByText(/^\d+.\d{3} mPa·s$/).first()).toBeVisible()
  await page.getByRole('group', { name: 'Instrument' }).getByRole('button', { name: /^V1/ }).tap()
  for (const word of [/^Odour/, /^Feel/]) {
    await pick(page, word)
    await page.getByRole('radio', { name: 'as the initial' }).tap()
  }

  watch.expectRefusal(/\/readings$/, 409)
  watch.expectRefusal(/\/readings$/, 422)
  await page.getByRole('button', { name: /^Keep/ }).tap()
  const asked = page.getByRole('dialog', { name: 'Is it so?' })
  await asked.getByRole('button', { name: 'It is so, keep it' }).tap()
  await expect(page.getByText(/^Kept: /)).toBeVisible()
  await expect(page, 'the next jar comes up').not.toHaveURL(new RegExp(`${code}$`))

  await page.goto(`/bench/${code}`)
  await expect(page.getByText(/^pH 6\.80/)).toContainText('typed 6,80 by MA; doubt: ')
  await page.getByRole('button', { name: 'Back to the walk' }).first().tap()
  await openStation(page, '5')
  await expect(page.getByRole('button', { name: /SI82-2.*repeat on a spare/ }).first()).toBeVisible()
})
