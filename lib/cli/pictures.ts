import { mkdir } from 'node:fs/promises'
import path from 'node:path'
import { chromium, type Page } from '@playwright/test'

/**
 * The README's pictures, taken from a running demo: `npm start` in one terminal, `npm run pictures` in another.
 * PUBLIC_URL says where it listens (http://127.0.0.1:3000 if it is not set).
 */
const base = process.env['PUBLIC_URL'] ?? 'http://127.0.0.1:3000'
const folder = path.resolve(import.meta.dirname, '../../fixtures/pictures')

type Picture = {
  file: string
  who: RegExp
  width: number
  height: number
  theme: 'light' | 'dark'
  open: (page: Page) => Promise<void>
}

const openStudy = async (page: Page, text: RegExp, part = '') => {
  await page.goto('/studies')
  const href = await page.getByRole('row', { name: text }).getByRole('link').first().getAttribute('href')
  await page.goto(`${href}${part}`)
}

const pictures: Picture[] = [
  {
    file: 'bench',
    who: /Mada Ashwell/,
    width: 390,
    height: 844,
    theme: 'light',
    open: async (page) => void (await page.goto('/bench')),
  },
  {
    file: 'jar',
    who: /Mada Ashwell/,
    width: 820,
    height: 1180,
    theme: 'dark',
    open: async (page) => {
      await page.goto('/bench')
      await page
        .locator('li button', { hasText: /stays sealed/ })
        .first()
        .click()
      await page.getByRole('button', { name: 'Water below: 0.1 mm more' }).waitFor()
      for (let i = 0; i < 9; i += 1)
        await page.getByRole('button', { name: 'Water below: 0.1 mm more' }).click()
    },
  },
  {
    file: 'sheet',
    who: /Liv Brannock/,
    width: 1440,
    height: 900,
    theme: 'light',
    open: (page) => openStudy(page, /N86/),
  },
  {
    file: 'curves',
    who: /Liv Brannock/,
    width: 1440,
    height: 900,
    theme: 'light',
    open: (page) => openStudy(page, /N86/, '/curves'),
  },
  {
    file: 'case',
    who: /Rune Tarrow/,
    width: 1440,
    height: 1000,
    theme: 'dark',
    open: async (page) => void (await page.goto('/cases/C-002')),
  },
]

await mkdir(folder, { recursive: true })
const browser = await chromium.launch({
  executablePath: process.env['CHROMIUM'] ?? '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    '--disable-gpu',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
    '--no-first-run',
  ],
})
try {
  for (const { file, who, width, height, theme, open } of pictures) {
    const context = await browser.newContext({
      baseURL: base,
      viewport: { width, height },
      colorScheme: theme,
    })
    const page = await context.newPage()
    await page.goto('/sign-in')
    await page.getByRole('button', { name: who }).click()
    await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'))
    await open(page)
    await page.waitForLoadState('networkidle')
    await page.screenshot({ path: path.join(folder, `${file}.png`) })
    console.log(`fixtures/pictures/${file}.png`)
    await context.close()
  }
} finally {
  await browser.close()
}
