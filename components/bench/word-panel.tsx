'use client'

import { LastValues } from '@/components/bench/last-values'
import { StartPhoto } from '@/components/bench/start-photo'
import type { FieldTab, JarEntry } from '@/components/bench/use-jar-entry'
import { arrowKeys } from '@/components/ui/arrow-keys'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** Words against the initial: one press each, the same as last time first at hand, then on to what is open. */
export function WordPanel({ jar, entry, group }: { jar: BenchJarPage; entry: JarEntry; group: FieldTab[] }) {
  const { field } = group[0]!.slot
  const last = field.last[0]?.word
  const fill = (word: string) => entry.fill(Object.fromEntries(group.map((tab) => [tab.key, word])))
  return (
    <div className="min-w-0">
      <div className="flex justify-between gap-4">
        <div className="min-w-0">
          <h2 className="text-22 font-650">{field.label}</h2>
          <p className="text-17 text-soft">{field.method}</p>
          <LastValues field={field} />
          {last ? (
            <button
              type="button"
              onClick={() => fill(last)}
              className="mt-2 min-h-16 rounded border-2 border-rule bg-paper px-4 text-18"
            >
              Same as last: <b>{last}</b>
            </button>
          ) : null}
        </div>
        {isSeen(field.attribute) ? <StartPhoto jar={jar} /> : null}
      </div>
      {group.map((tab) => (
        <div
          key={tab.key}
          className="mt-3 grid grid-cols-1 gap-3 sm:grid-cols-2"
          role="radiogroup"
          onKeyDown={arrowKeys}
          aria-label={group.length > 1 ? `${field.label} ${tab.slot.replicate}` : field.label}
        >
          {(field.words ?? []).map((word) => (
            <button
              key={word}
              type="button"
              role="radio"
              aria-checked={tab.text === word}
              onClick={() => entry.fill({ [tab.key]: word })}
              className={`min-h-[72px] rounded px-5 text-left text-22 ${tab.text === word ? 'border-[3px] border-ink bg-paper font-700' : 'border-2 border-rule bg-ground'}`}
            >
              {word}
            </button>
          ))}
        </div>
      ))}
    </div>
  )
}

/** A picture says nothing of an odour or a feel; of a protocol's own words it may. */
function isSeen(attribute: string): boolean {
  return attribute === 'look' || attribute.startsWith('own.')
}
