import { pressIn } from '../people'
import { expect, test } from '../watch'

test('The story, client: reads the signed report of its study, and nothing else is there', async ({
  page,
  watch,
}) => {
  await pressIn(page, 'pell')
  await expect(page).toHaveURL(/\/reports$/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('24 months for Body lotion L2, long-term')
  const reports = page.getByRole('main').getByRole('listitem')
  await expect(reports.first()).toContainText(/Approved by Rune Tarrow, /)
  await expect(reports.filter({ hasNotText: 'study S-001' }), 'another study’s').toHaveCount(0)
  const places = page.getByRole('navigation', { name: 'Notebook' }).getByRole('link')
  await expect(places).toHaveText(['Studies', 'Reports'])
  const report = await page.getByRole('link', { name: 'Open the report' }).first().getAttribute('href')
  expect((await page.request.get(report!)).status()).toBe(200)

  const elsewhere = ['/bench', '/formulas', '/batches', '/protocols', '/stations', '/instruments', '/cases']
  const others = ['/studies/S-002', '/studies/S-002/curves', '/studies/S-001/readings', '/studies/S-001/jars']
  const api = ['/api/people', '/api/trail', '/api/bench', '/api/studies/S-002/sheet', '/api/flags']
  for (const address of [...elsewhere, '/people', '/mails', '/trail', ...others])
    expect((await page.request.get(address)).status(), address).toBe(404)
  for (const address of api) expect([403, 404], address).toContain((await page.request.get(address)).status())
  watch.expectRefusal(/\/formulas$/, 404)
  await page.goto('/formulas')
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await expect(page.getByRole('table')).toHaveCount(0)
})
