import { openJar, openStation, pick, readBalance } from './bench'
import { openAs } from './people'
import { expect, test } from './watch'

test.use({ viewport: { width: 820, height: 1180 } })

test('D09: a jar that is kept without network waits in the tray and goes out once', async ({
  page,
  context,
  watch,
}) => {
  await openAs(page, 'jos', '/bench')
  const code = await openJar(page, '5', 'L1-1', 'look, stays sealed')
  await page.getByRole('button', { name: 'Water below: 0.1 mm more' }).click()
  await page.getByRole('button', { name: 'Water below: 0.1 mm less' }).click()
  await pick(page, /^Look/)
  await page.getByRole('radio', { name: 'as the initial' }).click()
  await pick(page, /^Mass/)
  await page.getByLabel('Mass', { exact: true }).fill(await readBalance(page, code))

  watch.expectNoNetwork()
  await context.setOffline(true)
  await page.getByRole('button', { name: /^Keep/ }).click()
  const tray = page.getByRole('button', { name: /^No network\. 1 jars? kept on this tablet/ })
  await expect(tray).toBeVisible()
  await expect(page, 'the next jar comes up all the same').not.toHaveURL(new RegExp(`${code}$`))

  const sent: number[] = []
  context.on('response', (answer) => {
    if (answer.request().method() === 'POST' && answer.url().endsWith('/readings')) sent.push(answer.status())
  })
  await context.setOffline(false)
  await expect(tray).toHaveCount(0)
  await page.goto('/bench')
  await openStation(page, '5')
  await expect(page.getByRole('button', { name: new RegExp(`^${code} .*read by JO`) })).toBeVisible()
  expect(sent).toEqual([200])
})
