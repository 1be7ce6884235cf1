import type { Metadata } from 'next'
import { AuthColumn } from '@/components/session/auth-column'
import { Masthead } from '@/components/session/masthead'
import { TokenPasswordForm } from '@/components/session/token-password-form'
import { LinkButton } from '@/components/ui/link-button'
import { visitor } from '@/lib/http/page'
import { findLab } from '@/lib/lab/queries'
import { findInvitation } from '@/lib/session/queries'

export const permission = 'public'
// The address holds a secret: it must not travel on as a referrer.
export const metadata: Metadata = { title: 'Invitation', referrer: 'no-referrer', robots: 'noindex' }

export default async function InvitationPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params
  const { db } = await visitor()
  const person = await findInvitation(db, token)
  const lab = await findLab(db)
  return (
    <>
      <header>
        <Masthead />
      </header>
      {person ? (
        <AuthColumn
          title={
            <>
              <b>{person.name}</b>, the notebook of {lab?.name ?? 'the lab'} is open to you
            </>
          }
          sentence={
            <>
              Choose a password; from then on you sign in with <b>{person.email}</b>.
            </>
          }
        >
          <TokenPasswordForm kind="invitation" token={token} email={person.email} />
        </AuthColumn>
      ) : (
        <AuthColumn
          title={
            <>
              This invitation is <b>used up or too old</b>
            </>
          }
          sentence="An invitation works once, for a week. Ask the manager of the lab to send it again."
        >
          <LinkButton href="/sign-in">To sign-in</LinkButton>
        </AuthColumn>
      )}
    </>
  )
}
