import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { AuthColumn } from '@/components/session/auth-column'
import { Masthead } from '@/components/session/masthead'
import { SetupForm } from '@/components/session/setup-form'
import { visitor } from '@/lib/http/page'
import { isSetUp } from '@/lib/lab/queries'

export const permission = 'public'
export const metadata: Metadata = { title: 'The first page' }

export default async function SetupPage() {
  const { db } = await visitor()
  if (await isSetUp(db)) redirect('/sign-in')
  return (
    <>
      <header>
        <Masthead claim="From the bench batch to a shelf life that QA has signed." />
      </header>
      <AuthColumn
        title={
          <>
            This notebook <b>is empty</b>; who keeps it?
          </>
        }
        sentence="Name the lab and its first manager, who then invites the others."
      >
        <SetupForm timeZones={Intl.supportedValuesOf('timeZone')} />
      </AuthColumn>
    </>
  )
}
