'use client'

import { useSyncExternalStore } from 'react'
import { readTheme, themeCookie, type Theme } from './theme'

const changed = 'stillstand-theme'

/** The choice is kept in a cookie, so that the server's first paint already has it. */
export function useTheme(): { theme: Theme; isDark: boolean; setTheme: (theme: Theme) => void } {
  const theme = useSyncExternalStore(listen, themeNow, () => 'system' as const)
  const isSystemDark = useSyncExternalStore(
    listenToSystem,
    () => matchMedia('(prefers-color-scheme: dark)').matches,
    () => false,
  )
  return { theme, isDark: theme === 'system' ? isSystemDark : theme === 'dark', setTheme }
}

function setTheme(theme: Theme) {
  const root = document.documentElement
  if (theme === 'system') root.removeAttribute('data-theme')
  else root.setAttribute('data-theme', theme)
  document.cookie = `${themeCookie}=${theme}; Path=/; Max-Age=31536000; SameSite=Lax`
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
