'use client'

import { createContext, useContext, useSyncExternalStore, type ReactNode } from 'react'
import { deviceOf, type Device } from './device'

const Person = createContext<string | null>(null)

/** Whose device it is on this page; everything of `components/device` asks here. */
export function DeviceOf({ personId, children }: { personId: string; children: ReactNode }) {
  return <Person.Provider value={personId}>{children}</Person.Provider>
}

/** Null while the server draws the page, which knows no device. */
export function useDevice(): Device | null {
  const personId = useContext(Person)
  const isBrowser = useSyncExternalStore(never, yes, no)
  return personId && isBrowser ? deviceOf(personId) : null
}

const never = () => () => undefined
const yes = () => true
const no = () => false
