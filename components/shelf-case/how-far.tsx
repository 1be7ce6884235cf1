import { Carry } from '@/components/charts/carry'
import type { CarryInput } from '@/components/charts/carry-data'
import type { Computed } from '@/lib/shelf-case/rules/build'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'

/** How far each attribute carries: its readings, then the line that carries it on, then where it ends. */
export function HowFar({ content, months }: { content: Computed; months: number }) {
  return <Carry {...carryOf(content, months)} />
}

function carryOf(content: Computed, months: number): CarryInput {
  const cap = content.cap ? Math.floor(content.cap.output.capMonths) : null
  const ends = content.attributes.map((a) => reachOf(a)).filter((m) => m !== null)
  const last = Math.max(months, cap ?? 0, content.dataMonths, ...ends.filter((m) => m <= 48))
  const endMonths = Math.max(6, Math.ceil((last * 1.1) / 6) * 6)
  const tick = endMonths > 36 ? 12 : endMonths > 12 ? 6 : 3
  return {
    endMonths,
    ticks: Array.from({ length: Math.floor(endMonths / tick) + 1 }, (_, i) => i * tick),
    readToMonths: content.dataMonths,
    proposedMonths: months > 0 ? months : null,
    capMonths: cap,
    ...(cap === null ? {} : { capText: `cap: ${cap}` }),
    attributes: content.attributes.map((a) => {
      const reach = reachOf(a)
      return {
        key: a.attribute,
        name: a.label,
        months: reach !== null && reach < endMonths ? reach : null,
        isLimiting: a.attribute === content.limitingAttribute,
        readings: readingsOf(a),
      }
    }),
  }
}

/** Where the attribute ends by itself, before the cap; null where it stays inside. */
function reachOf(a: AttributeEvidence): number | null {
  return a.basis === 'regression' ? a.crossingMonths : a.supportedMonths
}

function readingsOf(a: AttributeEvidence) {
  const byMonth = new Map<number, number>()
  for (const { months } of a.reading) {
    const at = Math.round(months * 2) / 2
    byMonth.set(at, (byMonth.get(at) ?? 0) + 1)
  }
  return [...byMonth].map(([months, count]) => ({
    months,
    marks: Array.from({ length: Math.min(6, count) }, () => 'read' as const),
  }))
}
