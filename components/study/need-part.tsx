'use client'

import { Section } from '@/components/ui/section'
import { JarNeed } from './jar-need'
import { JarTable } from './jar-table'
import type { Need } from './start-state'

/** The jars of one batch by kind and station, as far as it reaches for them. */
export function NeedPart({ need }: { need: Need }) {
  return (
    <Section title={`Jars of ${need.batch.code}`} aside={need.isReference ? 'a reference' : undefined}>
      <JarNeed need={need} />
      <JarTable plan={need.plan} of={need.batch.code} />
    </Section>
  )
}
