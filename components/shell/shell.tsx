'use client'

import Link from 'next/link'
import { usePathname } from 'next/navigation'
import type { ReactNode } from 'react'
import { DeviceOf } from '@/components/device/device-context'
import { DeviceKeeper } from '@/components/device/device-keeper'
import { ShellTray } from '@/components/device/tray'
import { Logo } from '@/components/marks/logo'
import { SignedOutDialog } from '@/components/session/signed-out-dialog'
import { Finder } from './finder'
import { Navigation } from './navigation'
import { PersonMenu, type Who } from './person-menu'
import type { Place } from './places'

type Props = { who: Who; places: Place[]; labName: string; day: string; isDemo: boolean; children: ReactNode }

/**
 * What stands around every page of the notebook. The Bench has a density of its own: its first page keeps a
 * slim line to leave by, and a jar's page draws its whole screen itself.
 */
export function Shell(props: Props) {
  const path = usePathname()
  const isBench = path === '/bench' || path.startsWith('/bench/')
  return (
    <DeviceOf personId={props.who.personId}>
      <DeviceKeeper person={props.who} />
      {isBench ? <BenchShell {...props} isWhole={path !== '/bench'} /> : <DeskShell {...props} path={path} />}
      <SignedOutDialog who={props.who} density={isBench ? 'bench' : 'desk'} />
    </DeviceOf>
  )
}

function DeskShell({ who, places, labName, day, isDemo, path, children }: Props & { path: string }) {
  const home = places.find((place) => place.href === '/studies') ?? places[0]
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header data-screen-only className="border-b border-rule xl:h-[42px] xl:border-ink print:border-0">
        <div className="flex flex-wrap items-end justify-between xl:flex-nowrap xl:px-10">
          <Link
            href={home?.href ?? '/'}
            className="flex h-[41px] flex-1 items-end gap-3 border-b border-ink pl-4 -outline-offset-2 sm:pl-10 xl:flex-none xl:border-0 xl:pl-0"
          >
            <Logo />
            <span className="pb-[1px] text-19 font-720 tracking-[-0.01em]">Stillstand</span>
          </Link>
          <Navigation
            places={places}
            path={path}
            className="order-last -mb-[3px] w-full px-4 sm:px-10 xl:order-none xl:mr-8 xl:ml-[14px] xl:w-auto xl:flex-1 xl:px-[22px]"
          />
          <div className="flex h-[41px] items-end gap-6 border-b border-ink pr-4 text-15 sm:pr-10 xl:border-0 xl:pr-0">
            <Finder places={places} />
            <span className="pb-[3px]">
              <PersonMenu who={who} />
            </span>
          </div>
        </div>
      </header>
      <main id="page" tabIndex={-1} className="flex-1 px-4 pb-16 outline-none sm:px-10">
        <ShellTray />
        {children}
      </main>
      <footer
        data-screen-only
        className="flex flex-wrap justify-between gap-x-6 border-t border-hair px-4 py-2.5 text-13 text-soft sm:px-10"
      >
        {isDemo ? (
          <p>
            <b className="text-ink">Demo.</b> Invented data: every person, batch and number here.
          </p>
        ) : (
          <p>Stillstand supports judgement; it does not certify.</p>
        )}
        <p>
          {labName}, {day}
        </p>
      </footer>
    </div>
  )
}

function BenchShell({ who, places, isWhole, children }: Props & { isWhole: boolean }) {
  const desk = places.find((place) => place.href === '/studies')
  return (
    <div data-density="bench" className="min-h-dvh text-17">
      <SkipLink />
      {isWhole ? null : (
        <header
          data-screen-only
          className="flex h-16 items-end justify-between gap-3 border-b border-ink px-4 sm:px-5"
        >
          <Link
            href="/bench"
            className="flex h-16 items-end gap-3 -outline-offset-2"
            aria-label="Stillstand, Bench"
          >
            <Logo />
            <span className="pb-[5px] text-19 font-720">Bench</span>
          </Link>
          <span className="flex h-16 items-end gap-4 sm:gap-6">
            {desk ? (
              <Link
                href={desk.href}
                className="flex h-16 items-end pb-1.5 text-17 underline underline-offset-4"
              >
                Desk
              </Link>
            ) : null}
            <span className="pb-1.5 text-17">
              <PersonMenu who={who} />
            </span>
          </span>
        </header>
      )}
      <main id="page" tabIndex={-1} className="outline-none">
        {children}
      </main>
    </div>
  )
}

function SkipLink() {
  return (
    <a
      href="#page"
      className="sr-only focus:not-sr-only focus:fixed focus:left-4 focus:top-2 focus:z-50 focus:rounded focus:bg-ink focus:px-4 focus:py-2.5 focus:text-onink"
    >
      To the page’s content
    </a>
  )
}
