export const themes = ['system', 'light', 'dark', 'dim'] as const

export type Theme = (typeof themes)[number]

export const themeCookie = 'theme'

export function readTheme(value: string | undefined): Theme {
  return themes.find((theme) => theme === value) ?? 'system'
}

/** Type one step larger, on this device. */
export const typeCookie = 'type'
