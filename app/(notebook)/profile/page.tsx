import type { Metadata } from 'next'
import { PasswordForm } from '@/components/person/password-form'
import { rolesInWords } from '@/components/shell/role-words'
import { Heading } from '@/components/ui/heading'
import { Section } from '@/components/ui/section'
import { page } from '@/lib/http/page'

export const permission = 'profile.own'
export const metadata: Metadata = { title: 'Your profile' }

export default async function ProfilePage() {
  const { actor } = await page(permission)
  return (
    <>
      <Heading
        crumb={actor.email}
        headline={
          <>
            <b>{actor.name}</b>, signing as {actor.initials}
          </>
        }
        sentence={`You work here as ${rolesInWords(actor.roles)}. Roles are given by the manager, never by oneself.`}
      />
      <Section
        title="Password"
        className="mt-8 max-w-[520px]"
        sentence="Changing it signs you out everywhere else. It never has to be changed without a reason."
      >
        {actor.isDemo ? (
          <p>You came in by one press from the sign-in page, so there is no password to change.</p>
        ) : (
          <PasswordForm email={actor.email} />
        )}
      </Section>
    </>
  )
}
