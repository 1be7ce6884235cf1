import type { JarEntry } from '@/components/bench/use-jar-entry'
import { hasOwnPanel } from '@/components/bench/kind-panel'
import { slotLabel, slotUnit, type Verdict } from '@/components/bench/verdict'

/** The jar's fields in the order of the protocol; a check mark for what is in. */
export function SlotTabs({ entry, hasPhotos }: { entry: JarEntry; hasPhotos: boolean }) {
  const { tabs, at, goTo } = entry
  const { note } = entry.draft
  const top = tabs.find((tab) => tab.slot.part === 'top')
  const bottom = tabs.find((tab) => tab.slot.part === 'bottom')
  return (
    <div
      role="tablist"
      aria-label="What is measured"
      className="mt-3 flex gap-3 overflow-x-auto px-4 sm:px-5"
    >
      {top && bottom ? (
        <Tab
          label="Layers"
          text={
            top.text === '' && bottom.text === ''
              ? 'not yet'
              : `${top.text || '0'} and ${bottom.text || '0'} mm`
          }
          isHere={at === top.key || at === bottom.key}
          mark={markOf(top.verdict)}
          onPick={() => goTo(top.key)}
        />
      ) : null}
      {tabs
        .filter((tab) => tab.slot.kind !== 'layer')
        .map((tab) => (
          <Tab
            key={tab.key}
            label={slotLabel(tab.slot)}
            text={
              tab.text === ''
                ? 'not yet'
                : hasOwnPanel(tab.slot)
                  ? tab.text
                  : `${tab.text} ${tab.slot.kind === 'word' ? '' : slotUnit(tab.slot)}`
            }
            isHere={tab.key === at}
            mark={markOf(tab.verdict)}
            onPick={() => goTo(tab.key)}
          />
        ))}
      {hasPhotos ? (
        <Tab label="Photo" text="take one" isHere={at === 'photo'} mark={null} onPick={() => goTo('photo')} />
      ) : null}
      <Tab
        label="Note"
        text={note ? note.slice(0, 14) : 'none'}
        isHere={at === 'note'}
        mark={note ? 'in' : null}
        onPick={() => goTo('note')}
      />
    </div>
  )
}

function markOf(verdict: Verdict): TabProps['mark'] {
  if (verdict.state === 'impossible') return 'wrong'
  return verdict.state === 'value' ? (verdict.isOut ? 'out' : 'in') : null
}

type TabProps = {
  label: string
  text: string
  isHere: boolean
  mark: 'in' | 'out' | 'wrong' | null
  onPick: () => void
}

function Tab({ label, text, isHere, mark, onPick }: TabProps) {
  return (
    <button
      type="button"
      role="tab"
      aria-selected={isHere}
      onClick={onPick}
      className={
        isHere
          ? 'min-h-[74px] min-w-[116px] shrink-0 grow border-t-[5px] border-ink bg-typed px-3 pb-2 text-left'
          : 'mb-2.5 min-h-16 min-w-[116px] shrink-0 grow rounded border-2 border-rule bg-paper px-3 py-1 text-left'
      }
    >
      <span className="flex items-center justify-between gap-2">
        <b className="text-18">{label}</b>
        {mark === 'in' ? (
          <svg viewBox="0 0 20 16" width="20" height="16" aria-label="in">
            <path d="M2 8 8 14 18 2" fill="none" stroke="currentColor" strokeWidth="3" />
          </svg>
        ) : null}
        {mark === 'out' ? <span className="font-700 text-alarm">out</span> : null}
        {mark === 'wrong' ? <span className="font-700 text-alarm">no</span> : null}
      </span>
      <span className={`block truncate text-17 ${text === 'not yet' || text === 'none' ? 'text-soft' : ''}`}>
        {text}
      </span>
    </button>
  )
}
