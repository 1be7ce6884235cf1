import { readFile } from 'node:fs/promises'
import type { Page } from '@playwright/test'
import { addDays } from '@/lib/study/rules/calendar'
import { namedDay } from '@/lib/study/rules/working-days'
import { drawnSquares } from '../support/drawn-squares'
import { pdfContents } from '../support/pdf-text'
import { readQr } from '../support/qr'
import { openAs } from './people'
import { expect, test } from './watch'

// A holiday is typed; the start of a study says which pulls it moves; they stand there; labels are saved as a PDF.

const name = 'Tasting day of the guild'

test('A holiday moves the pulls of a study that starts, and its labels come as a PDF', async ({
  page,
  browser,
}) => {
  await openAs(page, 'hedda', '/lab/settings')
  const today = await labDay(page)
  // Begun today, week 2 falls on it, whatever weekday today is.
  const holiday = addDays(today, 14)
  await page.getByLabel('Add holidays').fill(`${holiday} ${name}`)
  await page.getByRole('button', { name: 'Add the holiday' }).click()
  const row = page.getByRole('row', { name: new RegExp(name) }).filter({ has: page.getByRole('button') })
  await expect(row.filter({ hasText: namedDay(holiday) })).toHaveCount(1)

  const desk = await browser.newContext({ viewport: { width: 1440, height: 900 } })
  const formulator = await desk.newPage()
  try {
    await openAs(formulator, 'liv', '/studies/new')
    const moved = await startStudy(formulator, holiday)
    await saveLabels(formulator)
    await test.step('the jars are asked for on the day that was said', async () => {
      await formulator.goto(formulator.url().replace(/\/labels.*$/, '/jars'))
      await formulator.goto(formulator.url().replace(/\/jars$/, ''))
      await expect(formulator.getByRole('heading', { level: 1 })).toBeVisible()
      const code = /S-\d+/.exec(formulator.url())![0]
      const sheet = await (await formulator.request.get(`/api/studies/${code}/sheet`)).json()
      expect(JSON.stringify(sheet)).toContain(moved)
      expect(JSON.stringify(sheet)).not.toContain(`"dueOn":"${holiday}"`)
    })
  } finally {
    await desk.close()
  }

  await page.getByRole('button', { name: `Remove ${name}, ${namedDay(holiday)}` }).click()
  await expect(page.getByRole('button', { name: `Remove ${name}, ${namedDay(holiday)}` })).toHaveCount(0)
})

async function labDay(page: Page): Promise<string> {
  const { today } = await (await page.request.get('/api/workload')).json()
  return today
}

/** Starts a screen on the batch with the most left, and tells on which day its week 2 is planned. */
async function startStudy(page: Page, holiday: string): Promise<string> {
  await page.getByRole('checkbox', { name: /^SI80-3 / }).check()
  await page
    .getByLabel('Protocol', { exact: true })
    .selectOption({ label: 'P-01, version 1: Prototype screen, cream' })
  const week = page
    .getByRole('listitem')
    .filter({ hasText: `(${name})` })
    .filter({ hasText: 'Week 2' })
  await expect(week).toContainText(`instead of ${namedDay(holiday, false)}`)
  await expect(week).toContainText(/^Week 2 at 5 °C/)
  const said = await week.locator('b').first().innerText()
  const day = [-1, 1].map((away) => addDays(holiday, away)).find((one) => namedDay(one) === said)
  expect(day, `${said} lies in the window of a day`).toBeDefined()
  await expect(page.getByText(/^Fullest for the lab: week of \d+ \w+: .+ instead of .+\.$/)).toBeVisible()
  await page.getByLabel('Title').fill('Screen over a holiday')
  await page.getByLabel('pH of SI80-3').fill('5,6')
  await page.getByLabel('Viscosity of SI80-3').fill('62')
  await page.getByRole('button', { name: 'Start the study' }).click()
  await expect(page).toHaveURL(/\/studies\/S-\d+\/jars$/)
  return day!
}

async function saveLabels(page: Page) {
  await page.getByRole('link', { name: 'Print the labels' }).click()
  await page
    .getByLabel('Sheet', { exact: true })
    .selectOption({ label: 'US Letter, 3 by 10, labels of 66.7 × 25.4 mm' })
  await page.getByLabel('First free label').fill('29')
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^53\slabels on 3 sheets of US Letter$/)
  const shown = await page
    .getByRole('img', { name: /^Square of jar/ })
    .evaluateAll((squares) => squares.map((one) => one.getAttribute('aria-label')!.slice(-5)))
  const download = page.waitForEvent('download')
  await page.getByRole('link', { name: 'Save as PDF' }).click()
  const file = await download
  expect(file.suggestedFilename()).toMatch(/^labels-S-\d+\.pdf$/)
  const pages = pdfContents(new Uint8Array(await readFile(await file.path()))).map((content) =>
    drawnSquares(content).map(({ dark }) => readQr(dark)),
  )
  expect(pages.map((codes) => codes.length)).toEqual([2, 30, 21])
  expect(pages.flat()).toEqual(shown)
}
