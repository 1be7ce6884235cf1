import { TZDate } from '@date-fns/tz'
import { format } from 'date-fns'
import { choice, day, describeList } from '@/lib/list/schema'
import type { ReportRow } from './queries'

/** 2 Mar 2026, 16:42:07 +01:00 in the lab's zone: the form in which a signature's time is shown. */
export function instantText(iso: string, zone: string): string {
  return format(new TZDate(iso, zone), 'd MMM yyyy, HH:mm:ss xxx')
}

/** 2 Mar 2026, 16:42 in the lab's zone. */
export function minuteText(iso: string, zone: string): string {
  return format(new TZDate(iso, zone), 'd MMM yyyy, HH:mm')
}

export function dayText(iso: string): string {
  return format(new Date(`${iso.slice(0, 10)}T12:00:00`), 'd MMM yyyy')
}

/** 2 Mar, where the year goes without saying. */
export function shortDay(iso: string): string {
  return dayText(iso).replace(/ \d{4}$/, '')
}

export function weekText(weeks: number): string {
  return `week ${Math.round(weeks * 10) / 10}`
}

/** 3b15c039 44019465 …: a hash in groups of eight. */
export function hashGroups(sha256: string): string[] {
  return sha256.match(/.{8}/g) ?? []
}

export const reportList = describeList<ReportRow>()({
  name: 'reports',
  sort: 'signed',
  order: 'desc',
  columns: [
    { key: 'code', title: 'case', sort: 'text', value: (row) => row.code },
    { key: 'study', title: 'study', sort: 'text', value: (row) => row.studyCode },
    { key: 'title', title: 'title', sort: 'text', value: (row) => row.studyTitle },
    { key: 'months', title: 'months', kind: 'number', sort: 'number', value: (row) => row.proposedMonths },
    { key: 'storage', title: 'stored', value: (row) => row.storageStatement },
    { key: 'by', title: 'signed by', sort: 'text', value: (row) => row.personName },
    { key: 'signed', title: 'signed', kind: 'instant', sort: 'instant', value: (row) => row.signedAt },
    { key: 'state', title: 'stands at', sort: 'text', value: (row) => row.state },
    { key: 'sha256', title: 'SHA-256 of what was signed', value: (row) => row.contentSha256 },
    {
      key: 'belongs',
      title: 'signature belongs to it',
      value: (row) => (row.belongs ? 'yes' : 'no'),
    },
  ],
  filters: {
    state: choice('State', ['signed', 'superseded']),
    from: day('Signed from'),
    to: day('to'),
  },
})
