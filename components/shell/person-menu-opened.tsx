'use client'

import Link from 'next/link'
import { DropdownMenu } from 'radix-ui'
import { useState } from 'react'
import { useDevice } from '@/components/device/device-context'
import { forgetLastPerson } from '@/components/device/last-person'
import { UnsentDialog } from '@/components/device/unsent-dialog'
import { useOutbox } from '@/components/device/use-outbox'
import { send } from '@/lib/http/fetcher'
import { sentenceOf } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { PersonButton, type Who } from './person-menu'
import { themes, type Theme } from './theme'
import { useTheme } from './use-theme'

const themeWords: Record<Theme, string> = {
  system: 'As the device',
  light: 'Bright',
  dark: 'Dark',
  dim: 'Dim',
}

const item =
  'flex min-h-[var(--hit)] cursor-pointer select-none items-center gap-2.5 px-4 outline-none data-[highlighted]:bg-typed data-[highlighted]:shadow-[inset_3px_0_0_var(--ink)]'

/** Stands open when it comes: it was pressed before. */
export function PersonMenuOpened({ who }: { who: Who }) {
  const { theme, setTheme } = useTheme()
  const [isLeaving, setLeaving] = useState(false)
  const [isAsked, setAsked] = useState(false)
  const device = useDevice()
  const { items } = useOutbox()

  async function signOut() {
    setLeaving(true)
    try {
      await send('/api/session', 'DELETE', {})
      forgetLastPerson()
      await device?.store.dropData().catch(() => undefined)
      // A whole new page: nothing of this person's data may stay in memory.
      window.location.assign('/sign-in')
    } catch (thrown) {
      setLeaving(false)
      toast(sentenceOf(thrown).sentence, { isAlarm: true })
    }
  }

  return (
    <>
      {isAsked ? (
        <UnsentDialog
          count={items.length}
          isLeaving={isLeaving}
          onLeave={() => void signOut()}
          onClose={() => setAsked(false)}
        />
      ) : null}
      <DropdownMenu.Root modal={false} defaultOpen>
        <DropdownMenu.Trigger asChild>
          <PersonButton who={who} />
        </DropdownMenu.Trigger>
        <DropdownMenu.Content
          align="end"
          sideOffset={12}
          collisionPadding={8}
          className="floats z-50 w-[17em] text-left text-[length:var(--control-type)] font-430"
        >
          <p className="border-b border-hair px-4 py-3">
            <b className="block">{who.name}</b>
            <span className="break-words text-soft">{who.email}</span>
          </p>
          <DropdownMenu.RadioGroup value={theme} onValueChange={(value) => setTheme(value as Theme)}>
            <DropdownMenu.Label className="px-4 pt-2.5 text-[length:var(--note-type)] text-soft">
              Light of the page
            </DropdownMenu.Label>
            {themes.map((one) => (
              <DropdownMenu.RadioItem
                key={one}
                value={one}
                className={item}
                onSelect={(event) => event.preventDefault()}
              >
                <span
                  aria-hidden
                  className="flex h-[18px] w-[18px] items-center justify-center rounded-full border-2 border-rule"
                >
                  <DropdownMenu.ItemIndicator className="h-2 w-2 rounded-full bg-ink" />
                </span>
                {themeWords[one]}
              </DropdownMenu.RadioItem>
            ))}
          </DropdownMenu.RadioGroup>
          <DropdownMenu.Item asChild className={`${item} border-t border-hair`}>
            <Link href="/profile">Your profile</Link>
          </DropdownMenu.Item>
          <DropdownMenu.Item
            className={item}
            disabled={isLeaving}
            onSelect={(event) => {
              event.preventDefault()
              if (items.length > 0) setAsked(true)
              else void signOut()
            }}
          >
            {isLeaving ? 'Signing out' : 'Sign out'}
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Root>
    </>
  )
}
