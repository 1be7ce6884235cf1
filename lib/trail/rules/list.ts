import { choice, day, describeList } from '@/lib/list/schema'
import type { Change } from './changes'
import type { TrailLine } from './lines'
import { tableWords } from './words'

export const trailList = describeList<TrailLine>()({
  name: 'record',
  sort: 'entry',
  order: 'desc',
  columns: [
    { key: 'entry', title: 'entry', kind: 'number', sort: 'number', value: (line) => line.id },
    { key: 'when', title: 'when', kind: 'instant', value: (line) => line.at },
    { key: 'who', title: 'who', value: (line) => line.who },
    {
      key: 'what',
      title: 'what',
      value: (line) => [line.thing, line.name, line.act].filter(Boolean).join(' '),
    },
    { key: 'changes', title: 'before and after', value: (line) => line.changes.map(changeText).join('; ') },
    { key: 'why', title: 'why', value: (line) => line.reason },
  ],
  filters: {
    what: choice('What', Object.values(tableWords)),
    study: choice('Study'),
    by: choice('Who'),
    from: day('Written from'),
    to: day('to'),
  },
})

/** The database's own name of what the filter calls by a word. */
export function tableOf(word: string): string | undefined {
  return Object.entries(tableWords).find(([, one]) => one === word)?.[0]
}

function changeText({ field, before, after }: Change): string {
  if (before === null || after === null) return `${field} ${after ?? `${before}, removed`}`
  return `${field} was ${before}, now ${after}`
}
