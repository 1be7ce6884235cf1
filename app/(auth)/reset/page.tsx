import type { Metadata } from 'next'
import { AuthColumn } from '@/components/session/auth-column'
import { Masthead } from '@/components/session/masthead'
import { ResetRequestForm } from '@/components/session/reset-request-form'
import { visitor } from '@/lib/http/page'

export const permission = 'public'
export const metadata: Metadata = { title: 'A new password' }

export default async function ResetPage() {
  await visitor()
  return (
    <>
      <header>
        <Masthead />
      </header>
      <AuthColumn
        title={
          <>
            A new password comes <b>by mail</b>
          </>
        }
        sentence="Type the address you sign in with. The old password keeps working until you choose the new one."
      >
        <ResetRequestForm />
      </AuthColumn>
    </>
  )
}
