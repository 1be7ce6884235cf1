'use client'

import { useSyncExternalStore } from 'react'
import { readTheme, themeCookie, typeCookie, type Theme } from './theme'

const changed = 'stillstand-theme'

/** The choice is kept in a cookie, so that the server's first paint already has it. */
export function useTheme(): { theme: Theme; isDark: boolean; setTheme: (theme: Theme) => void } {
  const theme = useSyncExternalStore(listen, themeNow, () => 'system' as const)
  const isSystemDark = useSyncExternalStore(
    listenToSystem,
    () => matchMedia('(prefers-color-scheme: dark)').matches,
    () => false,
  )
  return { theme, isDark: theme === 'system' ? isSystemDark : theme !== 'light', setTheme }
}

function setTheme(theme: Theme) {
  const root = document.documentElement
  if (theme === 'system') root.removeAttribute('data-theme')
  else root.setAttribute('data-theme', theme)
  keep(themeCookie, theme)
}

/** Type one step larger, for whoever reads from further off. */
export function useLargeType(): { isLarge: boolean; setLarge: (isLarge: boolean) => void } {
  const isLarge = useSyncExternalStore(
    listen,
    () => document.documentElement.dataset.type === 'large',
    () => false,
  )
  return { isLarge, setLarge }
}

function setLarge(isLarge: boolean) {
  const root = document.documentElement
  if (isLarge) root.setAttribute('data-type', 'large')
  else root.removeAttribute('data-type')
  keep(typeCookie, isLarge ? 'large' : 'normal')
}

function keep(cookie: string, value: string) {
  document.cookie = `${cookie}=${value}; Path=/; Max-Age=31536000; SameSite=Lax`
  window.dispatchEvent(new Event(changed))
}

function themeNow(): Theme {
  return readTheme(document.documentElement.dataset.theme)
}

function listen(listener: () => void) {
  window.addEventListener(changed, listener)
  return () => window.removeEventListener(changed, listener)
}

function listenToSystem(listener: () => void) {
  const query = matchMedia('(prefers-color-scheme: dark)')
  query.addEventListener('change', listener)
  return () => query.removeEventListener('change', listener)
}
