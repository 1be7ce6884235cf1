import { KeepButton, whyNotKeep } from '@/components/bench/keep-button'
import { hasOwnPanel, KindPanel } from '@/components/bench/kind-panel'
import { LayerExtras } from '@/components/bench/layer-extras'
import { NotePanel, WordPanel } from '@/components/bench/other-panels'
import type { JarEntry } from '@/components/bench/use-jar-entry'
import { ValuePanel } from '@/components/bench/value-panel'
import { PhotoPanel } from '@/components/photo/photo-panel'
import { ErrorNote } from '@/components/ui/error-note'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

/** Where the hand is: one panel for each kind of field, and the button that keeps what is typed. */
export function FieldPanel({
  jar,
  entry,
  hasNext,
}: {
  jar: BenchJarPage
  entry: JarEntry
  hasNext: boolean
}) {
  const here = entry.tabs.find((tab) => tab.key === entry.at)
  const impossible = entry.tabs.find((tab) => tab.verdict.state === 'impossible')
  const keepButton = (
    <KeepButton
      busy={entry.isBusy}
      left={entry.open.length}
      why={whyNotKeep(entry.entries.length, impossible?.verdict)}
      hasNext={hasNext}
      onKeep={() => void entry.save()}
      onStep={entry.open.some((s) => s.key !== entry.at) ? entry.step : null}
    />
  )
  const read = (key: string) => entry.draft.texts[key] ?? ''
  return (
    <div className="flex-1 bg-typed px-4 pb-5 pt-4 sm:px-7">
      <ErrorNote error={entry.error} />
      {here && here.slot.kind !== 'word' && !hasOwnPanel(here.slot) ? (
        <ValuePanel
          jar={jar}
          slot={here.slot}
          text={here.text}
          verdict={here.verdict}
          instrument={entry.instrumentOf(here.slot)}
          onInstrument={(id) => entry.chooseInstrument(here.slot, id)}
          onText={(text) => entry.type(here.key, text)}
          onEnter={entry.step}
          keepButton={keepButton}
        />
      ) : (
        <>
          {here && hasOwnPanel(here.slot) ? (
            <KindPanel
              slot={here.slot}
              text={here.text}
              verdict={here.verdict}
              read={read}
              type={entry.type}
            />
          ) : here ? (
            <WordPanel slot={here.slot} text={here.text} onText={(text) => entry.type(here.key, text)} />
          ) : null}
          {entry.at === 'note' ? <NotePanel note={entry.draft.note} onNote={entry.note} /> : null}
          {entry.at === 'photo' ? (
            <PhotoPanel
              jar={jar}
              onMeasured={entry.slots.some((s) => s.kind === 'layer') ? entry.measure : null}
            />
          ) : null}
          <div className="ml-auto mt-4 max-w-[300px]">{keepButton}</div>
        </>
      )}
      {here?.slot.kind === 'layer' ? (
        <LayerExtras slot={here.slot} text={here.text} read={read} type={entry.type} />
      ) : null}
    </div>
  )
}
