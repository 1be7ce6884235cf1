'use client'

import { useEffect } from 'react'
import { useDevice } from './device-context'
import type { Store } from './store'

export type BenchPerson = {
  personId: string
  initials: string
  mayLog: boolean
  mayAddPhotos: boolean
  mayLogTemperature: boolean
}

/** Who was signed in last on this device; nothing more of a person is told outside of their own store. */
type LastPerson = { personId: string; initials: string }
const place = 'stillstand.person'

export function rememberLastPerson(person: LastPerson): void {
  try {
    localStorage.setItem(place, JSON.stringify(person))
  } catch {
    // Without it there is no Bench without network.
  }
}

export function forgetLastPerson(): void {
  localStorage.removeItem(place)
}

export function lastPerson(): LastPerson | null {
  try {
    return JSON.parse(localStorage.getItem(place) ?? 'null') as LastPerson | null
  } catch {
    return null
  }
}

/** What this person may do at the Bench, for when no server can say it. */
export function useRememberPerson(person: BenchPerson): void {
  const { personId, initials, mayLog, mayAddPhotos, mayLogTemperature } = person
  const device = useDevice()
  useEffect(() => {
    const data: BenchPerson = { personId, initials, mayLog, mayAddPhotos, mayLogTemperature }
    void device?.store.keepData('person', { readAt: '', data }).catch(() => undefined)
  }, [device, personId, initials, mayLog, mayAddPhotos, mayLogTemperature])
}

export async function findPerson(store: Store): Promise<BenchPerson | null> {
  const kept = await store.findData('person').catch(() => undefined)
  return (kept?.data as BenchPerson | undefined) ?? null
}
