import type { Mail } from '@/lib/mail/send'

type Person = { name: string; email: string }

export function invitationMail(person: Person, invitedBy: string, labName: string, link: string): Mail {
  return {
    to: person.email,
    subject: `${labName}: your account in Stillstand`,
    text: `${person.name},

${invitedBy} has added you to the stability notebook of ${labName}.
Choose your password here within a week:

${link}

The link works once. If you did not expect this, do nothing: without a password nobody can use the account.
`,
  }
}

export function resetMail(person: Person, labName: string, link: string): Mail {
  return {
    to: person.email,
    subject: `${labName}: choose a new password`,
    text: `${person.name},

somebody asked for a new password for this address in the stability notebook of ${labName}.
Choose it here within an hour:

${link}

The link works once and ends every session that is open. If it was not you, do nothing: your password stays as it is.
`,
  }
}
