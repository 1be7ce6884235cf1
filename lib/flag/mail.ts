import type { Mail } from '@/lib/mail/send'

export type MailedFlag = { number: number; sentence: string }

export function flagMail(
  person: { name: string; email: string },
  study: { code: string; title: string },
  flags: MailedFlag[],
  publicUrl: string,
): Mail {
  const one = flags.length === 1
  return {
    to: person.email,
    subject: one
      ? `${study.code}: flag ${flags[0]!.number} wants an answer`
      : `${study.code}: ${flags.length} flags want an answer`,
    text: `${person.name},

in study ${study.code}, ${study.title}:

${flags.map((flag) => `${flag.sentence}\n${publicUrl}/flags/${flag.number}`).join('\n\n')}

You get this because you follow the study.
`,
  }
}
