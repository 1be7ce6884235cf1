import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { DemoPeople } from '@/components/session/demo-people'
import { countWord } from '@/components/ui/count-word'
import { Masthead } from '@/components/session/masthead'
import { safeAddress } from '@/components/session/safe-address'
import { SignInForm } from '@/components/session/sign-in-form'
import { dayWithName } from '@/components/shell/day'
import { Band } from '@/components/ui/band'
import { env } from '@/lib/env'
import { visitor } from '@/lib/http/page'
import { findLab, isSetUp } from '@/lib/lab/queries'
import { listDemoPeople } from '@/lib/person/queries'

export const permission = 'public'
export const metadata: Metadata = { title: 'Sign in' }

type Props = { searchParams: Promise<{ to?: string | string[] }> }

export default async function SignInPage({ searchParams }: Props) {
  const { actor, db, now } = await visitor()
  const to = safeAddress((await searchParams).to)
  if (actor) redirect(to)
  if (!(await isSetUp(db))) redirect('/setup')
  const lab = await findLab(db)
  const people = env().demo ? await listDemoPeople(db) : []
  const isDemo = people.length > 0
  return (
    <>
      <header>
        {isDemo && lab ? (
          <Band aside={`${lab.name}, ${dayWithName(now, lab.timeZone)}`}>
            <b>Demo.</b> Invented data
            <span className="hidden sm:inline">: every person, batch and number here</span>.
          </Band>
        ) : null}
        <Masthead claim="From the bench batch to a shelf life that QA has signed." />
      </header>
      <main className="flex flex-1 flex-col">
        <div className="grid flex-1 content-start lg:grid-cols-[360px_1fr] lg:gap-x-[72px] lg:px-10 lg:pb-12 lg:pt-9">
          <section className="px-4 py-4 sm:max-w-[440px] sm:px-10 sm:py-8 lg:p-0">
            <h1 className="sr-only mb-4 text-24 font-650 sm:not-sr-only sm:mb-3.5">Sign in</h1>
            <SignInForm to={to} />
          </section>
          {isDemo ? (
            <section className="bg-recess px-4 py-4 sm:px-10 sm:py-8 lg:bg-transparent lg:p-0">
              <div className="mb-3 flex items-baseline justify-between gap-4 lg:mb-3.5">
                <h2 className="text-20 font-650 sm:text-24">
                  Or come in as one of {countWord(people.length)}
                </h2>
                <p className="hidden text-15 text-soft sm:block">one press, no password, demo only</p>
              </div>
              <DemoPeople people={people} to={to} />
            </section>
          ) : null}
        </div>
      </main>
    </>
  )
}
