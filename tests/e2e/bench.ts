import type { Page } from '@playwright/test'
import { expect } from './watch'

// What technicians do at the Bench in more than one test.

type Asks = 'look, stays sealed' | 'opened once'
type Jar = {
  grossG: number
  fields: { attribute: string; last: { value: number | null }[] }[]
}

/** Unfolds the place of the walk. */
export async function openStation(page: Page, celsius: string): Promise<void> {
  const place = page.getByRole('button', { name: new RegExp(`^${celsius} ?°C.*to read$`) })
  if ((await place.getAttribute('aria-expanded')) === 'false') await place.click()
}

/** Opens the first jar of a batch that is still to be read at a station and asks for this; gives its code. */
export async function openJar(page: Page, station: string, batch: string, asks: Asks): Promise<string> {
  await openStation(page, station)
  await page
    .getByRole('button', { name: new RegExp(`^[0-9A-Z]{5} ?${batch}, .*(by \\d|today only).*${asks}`) })
    .first()
    .click()
  await expect(page).toHaveURL(/\/bench\/[0-9A-Z]{5}$/)
  await expect(page.getByRole('tablist', { name: 'What is measured' })).toBeVisible()
  return codeOf(page)
}

export const codeOf = (page: Page) => page.url().split('/').at(-1)!

export const pick = (page: Page, tab: RegExp) => page.getByRole('tab', { name: tab }).click()

/** What the balance would show: the jar as it was filled, less a little. */
export async function readBalance(page: Page, code: string): Promise<string> {
  return ((await readJar(page, code)).grossG - 0.02).toFixed(2)
}

/** What an instrument would show: about the last value. */
export async function readLast(page: Page, code: string, attribute: string): Promise<number> {
  const { fields } = await readJar(page, code)
  return fields.find((field) => field.attribute === attribute)!.last[0]!.value!
}

async function readJar(page: Page, code: string): Promise<Jar> {
  return (await (await page.request.get(`/api/bench/${code}`)).json()) as Jar
}
