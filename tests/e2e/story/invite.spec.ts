import { pressIn } from '../people'
import { expect, test } from '../watch'

test('The story, manager: sees stations, instruments and people, and invites one by mail', async ({
  page,
  browser,
  baseURL,
  watch,
}) => {
  await pressIn(page, 'hedda')
  await expect(page).toHaveURL(/\/stations$/)
  await expect(page.getByRole('link', { name: /oven 3/ }).first()).toBeVisible()
  await page.getByRole('link', { name: 'Instruments', exact: true }).click()
  await expect(page.getByRole('link', { name: 'V1', exact: true })).toBeVisible()
  await page.getByRole('link', { name: 'People', exact: true }).click()
  await page.getByRole('button', { name: 'Change Hedda Vole' }).click()
  await expect(page.getByRole('dialog').getByRole('checkbox', { name: /^QA/ })).toBeDisabled()
  await page.keyboard.press('Escape')

  await page.getByRole('button', { name: 'Invite someone' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('E-mail').fill('oda@fernhollow.example')
  await dialog.getByLabel('Name').fill('Oda Lindgrave')
  await dialog.getByRole('checkbox', { name: /^technician/ }).check()
  await dialog.getByRole('button', { name: 'Send the invitation' }).click()
  await expect(page.getByRole('row', { name: /Oda Lindgrave.*invited, not yet answered/ })).toBeVisible()

  await expect
    .poll(async () => (await page.request.get('/api/mails')).text(), { timeout: 30_000 })
    .toContain('oda@fernhollow.example')
  await page.getByRole('link', { name: 'Mail', exact: true }).click()
  const mail = page.getByRole('listitem').filter({ hasText: 'oda@fernhollow.example' })
  await mail.getByText('your account in Stillstand').click()
  const link = mail.getByRole('link', { name: /\/invitation\// })
  await expect(link).toBeVisible()

  const other = await browser.newContext({ baseURL })
  await watch.over(other)
  const theirs = await other.newPage()
  await theirs.goto((await link.getAttribute('href'))!)
  await expect(theirs.getByRole('heading', { level: 1 })).toHaveText(/^Oda Lindgrave, the notebook/)
  await theirs.getByLabel('New password').fill('a jar is not a bottle')
  await theirs.getByRole('button', { name: 'Set it and go in' }).click()
  await expect(theirs).toHaveURL(/\/bench$/)
  await other.close()
})
