import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { SWRConfig } from 'swr'
import { Mails } from '@/components/person/mails'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { hasMailPage, listMails, mailsKey } from '@/lib/mail/inbox'

export const permission = 'mail.read'
export const metadata: Metadata = { title: 'Mail' }

export default async function MailsPage() {
  const { db } = await page(permission)
  if (!(await hasMailPage(db))) notFound()
  const mails = await listMails(db)
  const lab = await getLab(db)
  return (
    <SWRConfig value={{ fallback: { [mailsKey]: mails } }}>
      <Mails timeZone={lab.timeZone} />
    </SWRConfig>
  )
}
