'use client'

import { JarRuler } from '@/components/bench/jar-ruler'
import { LastValues, heightOf } from '@/components/bench/last-values'
import { StepButton } from '@/components/bench/layers-panel'
import { TypedNumber, VerdictLines } from '@/components/bench/number-fields'
import type { FieldTab, JarEntry } from '@/components/bench/use-jar-entry'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

type Props = { jar: BenchJarPage; entry: JarEntry; group: FieldTab[]; here: FieldTab }

/** Both layers side by side as they are typed; on a phone with the jar drawn beside them. */
export function LayerFields({ jar, entry, group, here }: Props) {
  const [top, bottom] = ['top', 'bottom'].map((part) => group.find((tab) => tab.slot.part === part)!)
  const { field } = here.slot
  const last = field.last[0]
  const before = last ? [heightOf(last, 'top'), heightOf(last, 'bottom')] : [null, null]
  const fill = jar.fillHeightMm
  const lastMm = (text: string | null) => (text === null ? null : Number(text))
  return (
    <div className="min-w-0">
      <div className="grid grid-cols-[76px_minmax(0,1fr)] items-center gap-2 sm:grid-cols-1">
        <div className="sm:hidden">
          <JarRuler
            fillMm={fill}
            topMm={entry.heightOf(top!)}
            bottomMm={entry.heightOf(bottom!)}
            lastTopMm={lastMm(before[0] ?? null)}
            lastBottomMm={lastMm(before[1] ?? null)}
            onTop={(mm) => entry.setHeight(top!, mm)}
            onBottom={(mm) => entry.setHeight(bottom!, mm)}
          />
        </div>
        <div className="flex min-w-0 flex-col gap-1 sm:flex-row sm:flex-wrap sm:gap-x-6">
          {[top!, bottom!].map((tab) => (
            <div key={tab.key} className="flex items-end justify-between gap-2">
              <div className="min-w-0">
                <TypedNumber
                  tab={tab}
                  isHere={tab.key === here.key}
                  size="small"
                  onText={(text) => entry.type(tab.key, text)}
                  onFocus={() => entry.goTo(tab.key)}
                  onEnter={entry.step}
                />
              </div>
              <div className="flex gap-2 sm:hidden">
                <StepButton tab={tab} sign="minus" onPress={() => entry.stepHeight(tab, -0.1)} />
                <StepButton tab={tab} sign="plus" onPress={() => entry.stepHeight(tab, 0.1)} />
              </div>
            </div>
          ))}
        </div>
      </div>
      {before[0] !== null && before[1] !== null ? (
        <button
          type="button"
          onClick={() => entry.fill({ [top!.key]: before[0]!, [bottom!.key]: before[1]! })}
          className="mt-2 min-h-16 rounded border-2 border-rule bg-paper px-4 text-18"
        >
          Same as last: <b>{before[0]}</b> and <b>{before[1]} mm</b>
        </button>
      ) : null}
      <div className="mt-1 text-17 sm:hidden">
        {here.verdict.state === 'value' ? (
          <b className={here.verdict.isOut ? 'text-alarm' : ''}>{here.verdict.value.toFixed(1)} % </b>
        ) : null}
        <LastValues field={field} className="inline" />
      </div>
      <VerdictLines verdict={here.verdict} />
    </div>
  )
}
