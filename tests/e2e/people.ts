import type { BrowserContext, Page } from '@playwright/test'
import { demoPeople, type DemoPerson } from '@/fixtures/demo/people'

type Cookies = Awaited<ReturnType<BrowserContext['cookies']>>

const kept = new Map<DemoPerson, Cookies>()

/** Presses the person's button on the sign-in page and goes on from there. */
export async function pressIn(page: Page, who: DemoPerson, to = '/'): Promise<void> {
  const { name } = demoPeople.find((person) => person.key === who)!
  await page.goto(`/sign-in?to=${encodeURIComponent(to)}`)
  await page.getByRole('button', { name }).click()
  await page.waitForURL((url) => url.pathname !== '/sign-in')
}

/** Opens a page as somebody who signed in earlier, or does so now. */
export async function openAs(page: Page, who: DemoPerson, to: string): Promise<void> {
  const cookies = kept.get(who)
  if (!cookies) {
    await pressIn(page, who, to)
    kept.set(who, await page.context().cookies())
    return
  }
  await page.context().addCookies(cookies)
  await page.goto(to)
}
