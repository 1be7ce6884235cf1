import type { Page } from '@playwright/test'
import type { DemoPerson } from '@/fixtures/demo/people'
import { filesNamed } from '../support/walk'
import { expectAxeClean } from './axe'
import { openAs } from './people'
import { expect, test } from './watch'

type Visit = {
  /** As the folder of the page is called under app. */
  page: string
  who: DemoPerson | null
  /** The address, or the list and the link to follow from there where only the application knows it. */
  at: string | { from: string; link: RegExp } | { asks: 'watch' | 'measuring' }
  phone?: true
  status?: number
}

/** Every page of app, as somebody whose page it is. */
const visits: Visit[] = [
  { page: '', who: 'mada', at: '/' },
  { page: 'sign-in', who: null, at: '/sign-in', phone: true },
  { page: 'shell', who: null, at: '/shell', phone: true },
  { page: 'setup', who: null, at: '/setup' },
  { page: 'reset', who: null, at: '/reset' },
  { page: 'reset/[token]', who: null, at: '/reset/worn-out' },
  { page: 'invitation/[token]', who: null, at: '/invitation/worn-out' },
  { page: 'bench', who: 'jos', at: '/bench', phone: true },
  { page: 'bench/[code]', who: 'jos', at: { asks: 'watch' }, phone: true },
  { page: 'bench/[code]', who: 'jos', at: { asks: 'measuring' } },
  { page: 'bench/day-sheet', who: 'jos', at: '/bench/day-sheet?blanks=yes' },
  { page: 'days', who: 'rune', at: '/days' },
  { page: 'days/[day]', who: 'rune', at: { from: '/days', link: /^\d+ [A-Z]/ }, phone: true },
  { page: 'studies', who: 'liv', at: '/studies', phone: true },
  { page: 'studies/new', who: 'liv', at: '/studies/new' },
  { page: 'studies/[code]', who: 'liv', at: '/studies/S-004', phone: true },
  { page: 'studies/[code]', who: 'pell', at: '/studies/S-001' },
  { page: 'studies/[code]/curves', who: 'liv', at: '/studies/S-004/curves', phone: true },
  { page: 'studies/[code]/readings', who: 'rune', at: '/studies/S-006/readings' },
  { page: 'studies/[code]/jars', who: 'mada', at: '/studies/S-005/jars' },
  { page: 'studies/[code]/labels', who: 'mada', at: '/studies/S-005/labels', phone: true },
  { page: 'studies/[code]/record', who: 'rune', at: '/studies/S-005/record' },
  { page: 'formulas', who: 'liv', at: '/formulas' },
  { page: 'formulas/new', who: 'liv', at: '/formulas/new' },
  { page: 'formulas/[code]', who: 'liv', at: '/formulas/N86' },
  { page: 'formulas/[code]/difference', who: 'liv', at: '/formulas/N86/difference?with=SI82', phone: true },
  { page: 'formulas/[code]/variants', who: 'liv', at: '/formulas/N86/variants' },
  {
    page: 'formulas/compare',
    who: 'liv',
    at: '/formulas/compare?code=SI80&code=SI82&code=N86&code=L1&code=L2',
    phone: true,
  },
  { page: 'ingredients', who: 'liv', at: '/ingredients', phone: true },
  { page: 'batches', who: 'liv', at: '/batches' },
  { page: 'batches/[code]', who: 'liv', at: '/batches/N86-1' },
  { page: 'batches/[code]/paper', who: 'liv', at: '/batches/N86-1/paper' },
  { page: 'batches/new', who: 'liv', at: '/batches/new' },
  { page: 'protocols', who: 'liv', at: '/protocols' },
  { page: 'protocols/[code]', who: 'liv', at: { from: '/protocols', link: /^P-/ } },
  { page: 'stations', who: 'hedda', at: '/stations' },
  { page: 'stations/[id]', who: 'hedda', at: { from: '/stations', link: /oven 3/ }, phone: true },
  { page: 'stations/[id]', who: 'mada', at: { from: '/stations', link: /lamp cabinet/ } },
  { page: 'instruments', who: 'hedda', at: '/instruments' },
  { page: 'instruments/[id]', who: 'hedda', at: { from: '/instruments', link: /^V1$/ } },
  { page: 'instruments/checks', who: 'mada', at: '/instruments/checks', phone: true },
  { page: 'cycles', who: 'mada', at: '/cycles', phone: true },
  { page: 'cases', who: 'rune', at: '/cases' },
  { page: 'cases/new', who: 'liv', at: '/cases/new?study=S-003' },
  { page: 'cases/[code]', who: 'rune', at: '/cases/C-002', phone: true },
  { page: 'reports', who: 'pell', at: '/reports', phone: true },
  { page: 'flags', who: 'liv', at: '/flags', phone: true },
  { page: 'flags/trust', who: 'liv', at: '/flags/trust', phone: true },
  { page: 'flags/[number]', who: 'liv', at: { from: '/studies/S-004', link: /^Answer flag \d+$/ } },
  { page: 'trail', who: 'rune', at: '/trail' },
  { page: 'lab', who: 'hedda', at: '/lab', phone: true },
  { page: 'lab', who: 'mada', at: '/lab' },
  { page: 'lab/settings', who: 'hedda', at: '/lab/settings', phone: true },
  { page: 'people', who: 'hedda', at: '/people' },
  { page: 'mails', who: 'hedda', at: '/mails' },
  { page: 'profile', who: 'hedda', at: '/profile' },
  { page: 'not-there', who: 'liv', at: '/not-there', status: 404 },
]

for (const visit of visits) {
  const address =
    typeof visit.at === 'string' ? visit.at : `${visit.page} by ${Object.values(visit.at).join(' ')}`
  test(`A07: ${address} as ${visit.who ?? 'a stranger'} keeps the policy, and axe finds nothing in either theme`, async ({
    page,
    watch,
  }) => {
    if (visit.status) watch.expectRefusal(/\/not-there$/, visit.status)
    await go(page, visit)
    await expect(page.getByRole('heading', { level: 1 })).toHaveCount(1)
    await expect(page.getByRole('main')).toHaveCount(1)
    await expectAxeClean(page, 'light')
    // The themes differ in colours alone.
    await setTheme(page, 'dark')
    await expectAxeClean(page, 'dark', { rules: ['color-contrast', 'link-in-text-block'] })
    if (!visit.phone) return
    await page.setViewportSize({ width: 390, height: 844 })
    await expectAxeClean(page, 'dark, on a phone')
    expect(await overflow(page), 'nothing sticks out sideways').toBeLessThanOrEqual(0)
  })
}

test('A malformed address is not found, and says so as everything else that is not there', async ({
  page,
}) => {
  await openAs(page, 'liv', '/profile')
  for (const address of ['/studies/%ff', '/bench/%E0%A4%A', '/batches/%zz', '/protocols/%00']) {
    const answer = await page.request.get(address)
    expect([address, answer.status()]).toEqual([address, 404])
    expect(await answer.text()).toContain('Nothing here')
  }
  const asked = await page.request.get('/api/bench/%ff')
  expect([asked.status(), await asked.json()]).toMatchObject([
    404,
    { error: { sentence: 'No jar has the code %FF. Read the label again.' } },
  ])
})

test('A07: every page of app is among those that are looked at', async () => {
  const pages = (await filesNamed('page.tsx')).map((file) =>
    file
      .replace(/^app\//, '')
      .replace(/\/?page\.tsx$/, '')
      .replace(/\([^)]*\)\/?/g, ''),
  )
  const looked = new Set(visits.map((visit) => visit.page))
  expect(pages.filter((page) => !looked.has(page))).toEqual([])
})

async function go(page: Page, { who, at }: Visit) {
  const first = typeof at === 'string' ? at : 'asks' in at ? '/bench' : at.from
  if (who) await openAs(page, who, first)
  else await page.goto(first)
  if (typeof at === 'string') return
  if ('asks' in at) return void (await page.goto(`/bench/${await dueJar(page, at.asks)}`))
  await page.getByRole('link', { name: at.link }).first().click()
  await page.waitForURL((url) => url.pathname !== at.from)
}

async function dueJar(page: Page, asks: string): Promise<string> {
  const { stations } = (await (await page.request.get('/api/bench')).json()) as {
    stations: { jars: { code: string; asks: string; state: string }[] }[]
  }
  return stations.flatMap(({ jars }) => jars).find((jar) => jar.asks === asks && jar.state === 'due')!.code
}

/** As the person's menu does it. */
async function setTheme(page: Page, theme: 'dark' | 'light') {
  await page.evaluate((name) => document.documentElement.setAttribute('data-theme', name), theme)
}

const overflow = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
