import { useEffect, useRef } from 'react'
import { LastValues } from '@/components/bench/last-values'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import { bandText } from '@/components/bench/verdict'
import { BandBar } from '@/components/marks/band-bar'
import { JarGlyph } from '@/components/marks/jar-glyph'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** A measuring jar: every field with its band and its last three values. A phone shows those of the field in hand. */
export function OverviewPanel({ jar, entry }: { jar: BenchJarPage; entry: JarEntry }) {
  const { at } = entry
  const tabs = entry.groups.map((group) => group.find((tab) => tab.key === at) ?? group[0]!)
  const here = useRef<HTMLLIElement>(null)
  useEffect(() => {
    // In braces: newer browsers answer with a promise, which is no clean-up.
    here.current?.scrollIntoView({ block: 'nearest' })
  }, [at])
  return (
    <div className="hidden gap-x-6 gap-y-3 px-7 pt-3 sm:grid sm:grid-cols-[140px_minmax(0,1fr)] beside:grid-cols-[96px_minmax(0,1fr)] beside:gap-x-4">
      <div className="beside:[&_svg]:h-auto beside:[&_svg]:w-full">
        <JarGlyph
          height={200}
          kind="measuring"
          topPercent={jar.layers?.topPercent ?? 0}
          bottomPercent={jar.layers?.bottomPercent ?? 0}
          title="The jar, opened once, with the layers last seen at its station"
        />
        {jar.asks === 'repeat' ? <p className="mt-2 text-17">A repeat on a spare jar.</p> : null}
      </div>
      {/* Standing upright, a tablet has room for four rows above the keys; the one in hand is among them. */}
      <div className="min-w-0 sm:max-h-[264px] sm:overflow-y-auto beside:max-h-none beside:overflow-visible">
        <ul>
          {tabs.map(({ key, slot, verdict }) => (
            <li key={key} ref={key === at ? here : null} className="border-b border-hair">
              <button
                type="button"
                onClick={() => entry.goTo(key)}
                aria-pressed={key === at}
                className="grid min-h-16 w-full grid-cols-[minmax(0,1fr)_120px_minmax(0,1.2fr)] items-center gap-x-4 py-2 beside:grid-cols-[minmax(0,1fr)_120px] text-left"
              >
                <span className={key === at ? 'font-700' : ''}>
                  {slot.field.label}
                  <span className="block text-17 sm:whitespace-nowrap font-430 text-soft">
                    {bandText(slot.field)}
                  </span>
                </span>
                <span>
                  {slot.field.words ? null : (
                    <BandBar
                      width={120}
                      lower={slot.field.band?.lower ?? null}
                      upper={slot.field.band?.upper ?? null}
                      initial={slot.field.initial}
                      last={slot.field.last[0]?.value ?? null}
                      now={verdict.state === 'value' ? verdict.value : null}
                    />
                  )}
                </span>
                <LastValues field={slot.field} className="beside:col-span-2" />
              </button>
            </li>
          ))}
        </ul>
      </div>
    </div>
  )
}
