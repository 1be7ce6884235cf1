import { CentrifugePanel } from '@/components/bench/centrifuge-panel'
import { ColourPanel } from '@/components/bench/colour-panel'
import type { OnPhoto, Slot } from '@/components/bench/draft'
import { DropletsPanel } from '@/components/bench/droplets-panel'
import { TypePanel } from '@/components/bench/type-panel'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { Verdict } from '@/components/bench/verdict'

export type PanelProps = {
  slot: Slot
  text: string
  verdict: Verdict
  /** Any text of the draft, also what is asked beside the field. */
  read: (key: string) => string
  type: (key: string, text: string) => void
  jar: BenchJarPage
  /** After typing: where on a photo it was measured. */
  markOnPhoto: (slot: Slot, onPhoto: OnPhoto) => void
  onPhoto: OnPhoto | undefined
}

const panels = {
  type: TypePanel,
  colour: ColourPanel,
  droplets: DropletsPanel,
  centrifuge: CentrifugePanel,
} as const

export function hasOwnPanel({ kind }: Slot): boolean {
  return kind in panels
}

/** Fields that are no single number and no word of a scale: a panel for each kind. */
export function KindPanel(props: PanelProps) {
  const Panel = panels[props.slot.kind as keyof typeof panels]
  return <Panel key={props.slot.key} {...props} />
}
