import type { Mail } from '@/lib/mail/send'

export type OverdueHalf = {
  studyCode: string
  studyTitle: string
  stationName: string
  cycle: number
  half: string
  begunBy: string
  /** The lab's own day and time. */
  dueAt: string
}

export function overdueMail(
  person: { name: string; email: string },
  half: OverdueHalf,
  publicUrl: string,
): Mail {
  const { studyCode, studyTitle, stationName, cycle, dueAt, begunBy } = half
  const name = `${half.half} half of cycle ${cycle}`
  return {
    to: person.email,
    subject: `${studyCode}: the ${name} is overdue`,
    text: `${person.name},

the ${name} of study ${studyCode}, ${studyTitle}, in ${stationName} was over ${dueAt} and has not been ended. ${begunBy} began it.

End it at the board, or hold it there with the reason:
${publicUrl}/cycles

This is said once for each half.
`,
  }
}
