import { TZDate } from '@date-fns/tz'
import { format } from 'date-fns'
import { thousands } from '@/lib/science/methods/thousands'

/** 2 Mar 2026, 16:42:07 +01:00 in the lab's zone: the form in which a signature's time is shown. */
export function instantText(iso: string, zone: string): string {
  return format(new TZDate(iso, zone), 'd MMM yyyy, HH:mm:ss xxx')
}

/** 2 Mar 2026, 16:42 in the lab's zone. */
export function minuteText(iso: string, zone: string): string {
  return format(new TZDate(iso, zone), 'd MMM yyyy, HH:mm')
}

export function dayText(iso: string): string {
  return format(new Date(`${iso.slice(0, 10)}T12:00:00`), 'd MMM yyyy')
}

/** 2 Mar, where the year goes without saying. */
export function shortDay(iso: string): string {
  return dayText(iso).replace(/ \d{4}$/, '')
}

/** pH 2 decimals, viscosity 3 significant figures, percent 1 decimal. */
export function figure(attribute: string, value: number): string {
  if (attribute === 'viscosity') return thousands(String(Number(value.toPrecision(3))))
  return value.toFixed(attribute === 'ph' ? 2 : 1).replace(/^-/, '\u2212')
}

export function weekText(weeks: number): string {
  return `week ${Math.round(weeks * 10) / 10}`
}

/** 3b15c039 44019465 …: a hash in groups of eight. */
export function hashGroups(sha256: string): string[] {
  return sha256.match(/.{8}/g) ?? []
}
