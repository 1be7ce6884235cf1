import { hasOwnPanel } from '@/components/bench/kind-panel'
import type { FieldTab, JarEntry } from '@/components/bench/use-jar-entry'
import { slotUnit } from '@/components/bench/verdict'
import { arrowKeys } from '@/components/ui/arrow-keys'

/** The jar's fields in the order of the protocol; a check mark for what is in. */
export function SlotTabs({ entry, hasPhotos }: { entry: JarEntry; hasPhotos: boolean }) {
  const { at, goTo, groups } = entry
  const { note } = entry.draft
  return (
    <div
      role="tablist"
      aria-label="What is measured"
      onKeyDown={arrowKeys}
      className="mt-2 flex min-w-0 gap-3 overflow-x-auto px-4 sm:px-5 beside:gap-2 beside:px-3"
    >
      {groups.map((group) => (
        <Tab
          key={group[0]!.key}
          label={group[0]!.slot.kind === 'layer' ? 'Layers' : labelOf(group)}
          text={textOf(group)}
          isHere={group.some((tab) => tab.key === at)}
          mark={markOf(group)}
          onPick={() => goTo((group.find((tab) => tab.text === '') ?? group[0]!).key)}
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

function labelOf([first]: FieldTab[]): string {
  return first!.slot.kind === 'gross' ? 'Mass' : first!.slot.field.label
}

function textOf(group: FieldTab[]): string {
  if (group.every((tab) => tab.text === '')) return 'not yet'
  const texts = group.map((tab) => tab.text || '–')
  const [{ slot }] = group as [FieldTab]
  return `${texts.join(slot.kind === 'layer' ? ' and ' : '; ')} ${slot.kind === 'word' || hasOwnPanel(slot) ? '' : slotUnit(slot)}`
}

function markOf(group: FieldTab[]): TabProps['mark'] {
  if (group.some((tab) => tab.verdict.state === 'impossible')) return 'wrong'
  if (group.some((tab) => tab.verdict.state === 'value' && tab.verdict.isOut)) return 'out'
  const isIn = group.every((tab) => tab.verdict.state === 'value')
  return isIn ? 'in' : null
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
          ? 'min-h-[74px] min-w-[112px] shrink-0 grow border-t-[5px] border-ink bg-typed px-3 pb-2 text-left'
          : 'mb-2.5 min-h-16 min-w-[112px] shrink-0 grow rounded border-2 border-rule bg-paper px-3 py-1 text-left'
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
      <span
        className={`block w-0 min-w-full truncate text-17 ${text === 'not yet' || text === 'none' ? 'text-soft' : ''}`}
      >
        {text}
      </span>
    </button>
  )
}
