import type { Metadata, Viewport } from 'next'
import localFont from 'next/font/local'
import { cookies, headers } from 'next/headers'
import { connection } from 'next/server'
import type { ReactNode } from 'react'
import { NonceForStyles } from '@/components/shell/nonce-for-styles'
import { readTheme, themeCookie, typeCookie } from '@/components/shell/theme'
import { Toasts } from '@/components/ui/toast'
import './globals.css'

// Two files a family, each with its range of characters: the second is fetched only for names that need it.
const text = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  variable: '--font-text',
})

const textMore = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  variable: '--font-text-more',
  declarations: [
    {
      prop: 'unicode-range',
      value: 'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+1E00-1E9F, U+1EF2-1EFF',
    },
  ],
})

const code = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  variable: '--font-code',
})

const codeMore = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-wght-normal.woff2',
  weight: '200 800',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  variable: '--font-code-more',
  declarations: [
    {
      prop: 'unicode-range',
      value: 'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+1E00-1E9F, U+1EF2-1EFF',
    },
  ],
})

export const metadata: Metadata = {
  title: { default: 'Stillstand', template: '%s · Stillstand' },
  description: 'From the bench batch to a shelf life that QA has signed.',
  icons: { icon: '/mark.svg' },
}

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#D5E0D8' },
    { media: '(prefers-color-scheme: dark)', color: '#0E1613' },
  ],
}

export default async function RootLayout({ children }: { children: ReactNode }) {
  // The nonce of the content security policy is made for each request, so no page may be made ahead.
  await connection()
  const nonce = (await headers()).get('x-nonce') ?? ''
  const kept = await cookies()
  const theme = readTheme(kept.get(themeCookie)?.value)
  return (
    <html
      lang="en"
      data-theme={theme === 'system' ? undefined : theme}
      data-type={kept.get(typeCookie)?.value === 'large' ? 'large' : undefined}
      className={`${text.variable} ${textMore.variable} ${code.variable} ${codeMore.variable}`}
    >
      <body className="font-sans">
        <NonceForStyles nonce={nonce} />
        {children}
        <Toasts />
      </body>
    </html>
  )
}
