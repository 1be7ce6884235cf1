import type { Metadata } from 'next'
import { AuthColumn } from '@/components/session/auth-column'
import { Masthead } from '@/components/session/masthead'
import { TokenPasswordForm } from '@/components/session/token-password-form'
import { LinkButton } from '@/components/ui/link-button'
import { visitor } from '@/lib/http/page'
import { findReset } from '@/lib/session/queries'

export const permission = 'public'
// The address holds a secret: it must not travel on as a referrer.
export const metadata: Metadata = { title: 'A new password', referrer: 'no-referrer', robots: 'noindex' }

export default async function SetPasswordPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params
  const { db } = await visitor()
  const person = await findReset(db, token)
  return (
    <>
      <header>
        <Masthead />
      </header>
      {person ? (
        <AuthColumn
          title={
            <>
              <b>{person.name}</b>, choose a new password
            </>
          }
          sentence="Every place where you are signed in is signed out, except this one."
        >
          <TokenPasswordForm kind="reset" token={token} email={person.email} />
        </AuthColumn>
      ) : (
        <AuthColumn
          title={
            <>
              This link is <b>used up or too old</b>
            </>
          }
          sentence="A link works once, for an hour. Nothing was changed."
        >
          <LinkButton href="/reset" kind="primary">
            Send me another
          </LinkButton>
        </AuthColumn>
      )}
    </>
  )
}
