import { demoPassword } from '@/lib/lab/rules'
import { pressIn } from '../people'
import { expect, test } from '../watch'

test('The story, QA: S01, S03: signs the case that waits with the password and a meaning, and opens the report', async ({
  page,
  watch,
}) => {
  await pressIn(page, 'rune')
  await expect(page).toHaveURL(/\/cases$/)
  const waiting = page.getByRole('row', { name: /QA signs or sends back/ }).first()
  await waiting.getByRole('link').click()
  await expect(page).toHaveURL(/\/cases\/C-\d+$/)
  const code = page.url().split('/').at(-1)!

  const form = page.getByRole('form', { name: 'Your signature' })
  const sign = form.getByRole('button', { name: 'Sign', exact: true })
  const password = form.getByLabel('Password, once more')
  await expect(sign).toHaveAccessibleDescription('Choose a meaning first.')
  await form.getByRole('radio', { name: /^Approve\./ }).check()
  watch.expectRefusal(new RegExp(`/api/cases/${code}/sign$`), 422)
  await password.fill('not my password')
  await sign.click()
  await expect(form.getByRole('alert').first()).toHaveText(/not your password/)
  await expect(password).toHaveValue('')

  await password.fill(demoPassword)
  await sign.click()
  const signature = page.getByRole('region', { name: 'Signature' })
  await expect(signature.getByRole('heading', { name: 'Approved' })).toBeVisible()
  await expect(signature).toContainText(
    /Rune Tarrow, \d+ [A-Z][a-z]{2} \d{4}, \d\d:\d\d:\d\d [+\u2212-]\d\d:\d\d/,
  )
  await expect(form).toHaveCount(0)

  const report = await signature.getByRole('link', { name: 'Open the report' }).getAttribute('href')
  const [first, second] = [await page.request.get(report!), await page.request.get(report!)]
  expect(first.headers()['content-type']).toBe('application/pdf')
  const bytes = await first.body()
  expect(bytes.subarray(0, 5).toString()).toBe('%PDF-')
  expect(bytes.equals(await second.body()), 'made twice, the same to the last byte').toBe(true)
})
