'use client'

import { useEffect, useState } from 'react'
import { SWRConfig } from 'swr'
import { BenchApp } from '@/components/bench/bench-app'
import { Logo } from '@/components/marks/logo'
import { LinkButton } from '@/components/ui/link-button'
import { DeviceOf } from './device-context'
import { DeviceKeeper } from './device-keeper'
import { deviceOf } from './device'
import { findPerson, lastPerson, type BenchPerson } from './last-person'

/**
 * Stands at whatever address was opened while the network is away. The Bench is drawn from what the device keeps for
 * who was signed in last; every other page says that it needs the network.
 */
export function OfflineNotebook() {
  const [person, setPerson] = useState<BenchPerson | null | undefined>()
  const [isBench, setBench] = useState(false)

  useEffect(() => {
    const last = lastPerson()
    void (last ? findPerson(deviceOf(last.personId).store) : Promise.resolve(null)).then((found) => {
      setBench(/^\/bench(\/|$)/.test(window.location.pathname))
      setPerson(found)
    })
  }, [])

  if (person === undefined) return null
  if (!person || !isBench) return <NeedsNetwork hasBench={person !== null} />
  return (
    <DeviceOf personId={person.personId}>
      <DeviceKeeper person={person} />
      <div data-density="bench" className="min-h-dvh text-17">
        <main id="page" tabIndex={-1} className="outline-none">
          <SWRConfig value={{ shouldRetryOnError: false }}>
            <BenchApp person={person} />
          </SWRConfig>
        </main>
      </div>
    </DeviceOf>
  )
}

function NeedsNetwork({ hasBench }: { hasBench: boolean }) {
  return (
    <main
      data-density="bench"
      className="mx-auto flex min-h-dvh max-w-[820px] flex-col gap-6 px-4 py-8 text-18 sm:px-10"
    >
      <p className="flex items-end gap-3 border-b border-ink pb-2 text-19 font-720">
        <Logo />
        Stillstand
      </p>
      <h1 className="text-36 leading-tight sm:text-44">
        <b>No network</b>, and this page needs it
      </h1>
      {hasBench ? (
        <>
          <p>
            The Bench works without: today’s jars and those of the next days, with their bands and last
            values, are on this device. What you type and photograph is kept here and goes out when the
            network is back.
          </p>
          <p className="flex flex-wrap gap-3">
            <LinkButton kind="primary" href="/bench" prefetch={false}>
              To the Bench
            </LinkButton>
          </p>
        </>
      ) : (
        <p>
          Nobody is signed in on this device, and signing in needs the network. What was typed here earlier is
          kept for its author.
        </p>
      )}
      <p>
        <button
          type="button"
          className="min-h-16 text-18 underline underline-offset-4"
          onClick={() => window.location.reload()}
        >
          Try again
        </button>
      </p>
    </main>
  )
}
