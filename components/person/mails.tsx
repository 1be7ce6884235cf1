'use client'

import { useState, type ReactNode } from 'react'
import useSWR from 'swr'
import { momentInWords } from '@/components/shell/day'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import type { ClientError } from '@/lib/http/fetcher'
import { fetcher } from '@/lib/http/fetcher'
import type { KeptMail } from '@/lib/mail/inbox'

const mailsKey = '/api/mails'

/** What left the notebook while the demo runs: nothing of it leaves the machine. */
export function Mails({ timeZone }: { timeZone: string }) {
  const { data: mails = [] } = useSWR<KeptMail[], ClientError>(mailsKey, fetcher, { refreshInterval: 10_000 })
  const [openId, setOpenId] = useState<string | null>(null)
  const newest = mails[0]
  return (
    <>
      <Heading
        crumb="Kept on this machine while the demo runs"
        headline={headlineOf(mails.length)}
        sentence={
          newest
            ? `The last one went to ${newest.to.join(', ')} on ${momentInWords(newest.at, timeZone)}.`
            : 'Invitations, new passwords, flags and signatures are written from here.'
        }
      />
      <div className="mt-8">
        {mails.length === 0 ? (
          <Empty
            title="No mail has been sent yet"
            sentence="Invite someone, or ask for a new password at the sign-in page: the mail appears here within seconds."
          />
        ) : (
          <ul className="border-t-[1.75px] border-ink">
            {mails.map((mail) => (
              <li key={mail.id} className="border-b border-hair">
                <details
                  open={openId === mail.id}
                  onToggle={(event) => {
                    if (event.currentTarget.open) setOpenId(mail.id)
                    else if (openId === mail.id) setOpenId(null)
                  }}
                >
                  <summary className="grid min-h-11 list-none grid-cols-1 items-baseline gap-x-6 py-2 sm:min-h-9 sm:grid-cols-[minmax(0,1fr)_minmax(0,16rem)_10rem] sm:py-1.5">
                    <span className={openId === mail.id ? 'font-700' : 'font-600'}>{mail.subject}</span>
                    <span className="truncate text-soft">{mail.to.join(', ')}</span>
                    <span className="text-soft sm:text-right">{momentInWords(mail.at, timeZone)}</span>
                  </summary>
                  <p className="mb-4 mt-1 max-w-[76ch] whitespace-pre-wrap break-words border-l-[3px] border-ink pl-4">
                    {withLinks(mail.text)}
                  </p>
                </details>
              </li>
            ))}
          </ul>
        )}
      </div>
    </>
  )
}

function headlineOf(count: number): ReactNode {
  if (count === 0) return 'Nothing has been written yet'
  return (
    <>
      <b>{count === 1 ? 'One mail' : `${count} mails`}</b> left the notebook
    </>
  )
}

/** A link of a mail opens as it would in a mail program: without saying where it was pressed. */
function withLinks(text: string): ReactNode[] {
  return text.split(/(https?:\/\/\S+)/).map((part, index) =>
    index % 2 === 1 ? (
      <a key={index} href={part} rel="noreferrer" className="font-650 underline underline-offset-4">
        {part}
      </a>
    ) : (
      part
    ),
  )
}
