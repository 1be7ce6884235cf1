import { demoPeople } from '@/fixtures/demo/people'
import { emptyLab, firstCode } from '../support/e2e-labs'
import { expect, test } from './watch'

test.use({ baseURL: emptyLab.url })

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

  await page.getByLabel('Code from the server’s console').fill(await firstCode())
  await page.getByRole('button', { name: 'Begin the notebook' }).click()
  await expect(page).toHaveURL(/\/people$/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/One person keeps this notebook/)

  await page.goto('/setup')
  await expect(page, 'the door closes behind the first manager').not.toHaveURL(/\/setup$/)
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

  await page.getByLabel('E-mail').fill('ansa@bench.example')
  await page.getByLabel('Password', { exact: true }).fill('oil and water apart')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page).toHaveURL(/\/stations$/)
})
