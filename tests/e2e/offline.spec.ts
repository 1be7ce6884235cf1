import { execFileSync } from 'node:child_process'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { chromium } from '@playwright/test'
import { Jimp } from 'jimp'
import { walkStudy, type WalkStudy } from '../support/walk-study'
import { openAs, pressIn } from './people'
import { expect, test } from './watch'

const viewport = { width: 820, height: 1180 }
const most = 20
test.use({ viewport, serviceWorkers: 'allow' })

let study: WalkStudy
test.beforeAll(async () => {
  study = await walkStudy(most + 2)
})
test.afterAll(() => study.close())

test('D09: twenty jars and their photos, typed without network in a browser that is killed, arrive once and in order', async ({
  watch,
  baseURL,
}, { project }) => {
  test.setTimeout(240_000)
  const folder = await mkdtemp(path.join(tmpdir(), 'stillstand-tablet-'))
  const { args = [], ...options } = project.use.launchOptions ?? {}
  const tablet = (more: string[] = []) =>
    chromium.launchPersistentContext(folder, {
      ...options,
      args: [...args, ...more],
      ...{ viewport, baseURL: baseURL! },
    })
  watch.expectNoNetwork()
  let context = await tablet()
  try {
    await watch.over(context)
    const first = await context.newPage()
    await pressIn(first, 'mada', '/bench')
    await expect(first.getByText('Ready without network')).toBeVisible({ timeout: 40_000 })
    const cookies = await context.cookies()

    await context.setOffline(true)
    for (const [at, { code }] of study.jars.slice(0, most).entries()) {
      await first.goto(`/bench/${code}`)
      await first.getByRole('tab', { name: /^Photo/ }).click()
      await first
        .locator('input[type="file"]')
        .first()
        .setInputFiles(await photo(at))
      await expect(first.getByAltText('Photo on its way')).toBeVisible()
      await first.getByRole('button', { name: 'Water below: 0.1 mm more' }).click()
      await first.getByRole('button', { name: /^Keep/ }).click()
      await expect(first, `jar ${at + 1} is kept and another comes up`).not.toHaveURL(new RegExp(`${code}$`))
    }
    await expect(first.getByRole('button', { name: `${2 * most} kept on this tablet` })).toBeVisible()

    kill(folder)
    await context.close().catch(() => undefined)
    // Nothing is reached from its first moment, not by the worker either, which sends before a page is open.
    context = await tablet(['--proxy-server=http://127.0.0.1:9', '--proxy-bypass-list=<-loopback>'])
    await watch.over(context)
    const second = await context.newPage()
    await second.goto('/bench')
    await second.getByRole('button', { name: `${2 * most} kept on this tablet` }).click()
    await expect(second.getByRole('dialog').getByRole('listitem')).toHaveCount(2 * most)
    await second.goto('/studies')
    await expect(second.getByRole('heading', { level: 1 })).toHaveText('No network, and this page needs it')
    expect(await arrived(), 'nothing has gone out').toEqual({ readings: [], photos: [] })

    kill(folder)
    await context.close().catch(() => undefined)
    context = await tablet()
    await watch.over(context)
    // The jar of cookies is written to disk every half minute only; the session itself is not what is tried here.
    await context.addCookies(cookies)
    const third = await context.newPage()
    await third.goto('/bench')
    await expect(third.getByText('Ready without network'), 'nothing waits').toBeVisible({ timeout: 60_000 })
  } finally {
    await context.close().catch(() => undefined)
    await rm(folder, { recursive: true, force: true })
  }
  const typed = study.jars.slice(0, most).map((jar) => jar.code)
  expect(await arrived()).toEqual({ readings: typed, photos: typed })
})

test('A04, A12: what was typed outlives the session, and waits unseen while another person has the tablet', async ({
  page,
  context,
  watch,
}) => {
  const { code } = study.jars[most]!
  await openAs(page, 'jos', `/bench/${code}`)
  await page.getByRole('button', { name: 'Water below: 0.1 mm more' }).click()
  await page.getByRole('tab', { name: /^Note/ }).click()
  await page.getByLabel('Note', { exact: true }).fill('a hair on the lid')

  // The session ends; whoever opens the jar again signs in first and is where he was.
  watch.expectRefusal(/\/api\//, 401)
  await context.clearCookies()
  await page.reload()
  await expect(page).toHaveURL(/\/sign-in\?to=/)
  await page.getByRole('button', { name: 'Jos Okarin' }).click()
  await expect(page).toHaveURL(new RegExp(`/bench/${code}$`))
  await expect(page.getByLabel('Note', { exact: true })).toHaveValue('a hair on the lid')
  await expect(page.getByRole('button', { name: /^Water below/ }).first()).toContainText('0.1')

  // It ends once more while the jar is being kept.
  const cookies = await context.cookies()
  await context.clearCookies()
  await page.getByRole('button', { name: /^Keep/ }).click()
  const asked = page.getByRole('dialog', { name: 'You were signed out' })
  await asked.getByRole('button', { name: 'Not now' }).click()
  await expect(page.getByRole('button', { name: /^Signed out/ })).toBeVisible()

  await pressIn(page, 'mada', '/bench')
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await expect(page.getByRole('button', { name: /kept on this tablet/ })).toHaveCount(0)
  await page.goto(`/bench/${code}`)
  await expect(page.getByRole('button', { name: 'Water below: 0.1 mm more' })).toBeVisible()
  await page.getByRole('tab', { name: /^Note/ }).click()
  await expect(page.getByLabel('Note', { exact: true })).toHaveValue('')

  await context.clearCookies()
  await context.addCookies(cookies)
  await page.goto(`/bench`)
  await expect.poll(async () => (await arrived()).readings).toContain(code)
})

test('D09: a note marked as read and a stand-in, pressed without network, arrive once each', async ({
  page,
  context,
  watch,
}) => {
  const { code, pullJarId } = study.jars[most + 1]!
  const text = `Oven door left ajar, ${code}`
  await openAs(page, 'mada', '/bench')
  await page.getByRole('button', { name: 'Hand over' }).click()
  await page.getByLabel('For the next shift').fill(text)
  await page.getByRole('button', { name: 'Leave the note' }).click()
  const note = page.getByRole('region', { name: 'Notes from the shift before' })
  await expect(note).toContainText(text)

  await page.goto(`/bench/${code}`)
  await page.getByRole('button', { name: 'Cannot be read' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'broken' }).click()
  await dialog.getByRole('button', { name: 'Note it as not read' }).click()
  await page.getByRole('button', { name: 'Leave it unread' }).click()
  // Thought better of, at the jar's own page.
  await page.goto(`/bench/${code}`)
  const spare = page.getByRole('listitem').filter({ hasText: 'spare' }).first().getByRole('button')
  await expect(spare).toBeVisible()
  watch.expectNoNetwork()
  await context.setOffline(true)
  await spare.click()
  await expect(page).toHaveURL(/\/bench$/)
  await note.getByRole('button', { name: 'Read' }).first().click()
  await expect(note).toContainText('Read, not sent yet')
  await expect(page.getByRole('button', { name: '2 kept on this tablet' })).toBeVisible()

  await context.setOffline(false)
  const waiting = page.getByRole('button', { name: 'Show what waits.' })
  await expect(waiting, 'nothing waits').toHaveCount(0, { timeout: 20_000 })
  const standIns = study.db.selectFrom('pullJar').select('id').where('standsInFor', '=', pullJarId)
  expect(await standIns.execute()).toHaveLength(1)
  const readOf = study.db
    .selectFrom('handoverRead as r')
    .innerJoin('handoverNote as n', 'n.id', 'r.handoverNoteId')
    .select('r.id')
    .where('n.text', '=', text)
  expect(await readOf.execute()).toHaveLength(1)
})

/** As an empty battery would: no process of this browser gets to say goodbye. */
function kill(folder: string): void {
  const lines = execFileSync('ps', ['-eo', 'pid=,args='], { encoding: 'utf8' }).split('\n')
  for (const line of lines.filter((one) => one.includes(folder)))
    process.kill(Number.parseInt(line, 10), 'SIGKILL')
}

async function photo(at: number) {
  const picture = new Jimp({ width: 64, height: 96, color: 0x406080ff + at * 0x01000000 })
  return { name: `jar-${at}.jpg`, mimeType: 'image/jpeg', buffer: await picture.getBuffer('image/jpeg') }
}

/** Codes of the jars in the order in which their readings and photos came to the server. */
async function arrived(): Promise<{ readings: string[]; photos: string[] }> {
  const ids = study.jars.map((jar) => jar.pullJarId)
  const codesOf = async (table: 'reading' | 'photo') => {
    const rows = await study.db
      .selectFrom(table)
      .innerJoin('jar', 'jar.id', `${table}.jarId`)
      .select('jar.code')
      .where(`${table}.pullJarId`, 'in', ids)
      .orderBy(`${table}.recordedAt`)
      .execute()
    return rows.map((row) => row.code)
  }
  return { readings: await codesOf('reading'), photos: await codesOf('photo') }
}
