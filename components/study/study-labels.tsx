'use client'

import Link from 'next/link'
import { useState } from 'react'
import { LabelSheet } from '@/components/jar/label-sheet'
import type { Label } from '@/components/jar/label-shapes'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { Heading } from '@/components/ui/heading'
import { Select } from '@/components/ui/select'
import { genericGrids, gridName, labelsPerSheet, papers, type LabelGrid } from '@/lib/label/rules/grid'
import { chooseJars, labelledJars, sheetsOf } from '@/lib/label/rules/choose'
import { labelKeys } from '@/lib/label/keys'
import { ownGridKey, type LabelChoice } from '@/lib/label/schema'

export type LabelledJar = {
  code: string
  state: string
  studyStationId: string | null
  isMoved: boolean
  /** The station as a person chooses it. */
  station: string
  label: Label
}

type Props = { code: string; jars: LabelledJar[]; ownGrid: LabelGrid | null; start: LabelChoice }

/** Label sheets as they will be printed: which sheet, where on it, which jars. */
export function StudyLabels({ code, jars, ownGrid, start }: Props) {
  const [choice, setChoice] = useState<LabelChoice>(start)
  const [typedFirst, setTypedFirst] = useState(String(start.first))
  const set = (change: Partial<LabelChoice>) => setChoice((before) => ({ ...before, ...change }))
  const grids = [
    ...genericGrids.map(({ key, grid }) => ({ key, grid, label: gridName(grid) })),
    ...(ownGrid ? [{ key: ownGridKey, grid: ownGrid, label: `The lab’s own: ${gridName(ownGrid)}` }] : []),
  ]
  const { grid } = grids.find((one) => one.key === choice.sheet) ?? grids[0]!
  const whole = labelsPerSheet(grid)
  const { chosen, fault } = chooseJars(jars, choice)
  const firstFault =
    /^\d+$/.test(typedFirst.trim()) && Number(typedFirst) >= 1 && Number(typedFirst) <= whole
      ? undefined
      : `Type a number from 1 to ${whole}.`
  const sheets = sheetsOf(
    chosen.map((jar) => jar.label),
    grid,
    choice.first,
  )
  const moved = labelledJars(jars).filter((jar) => jar.isMoved).length
  const isReady = chosen.length > 0 && !firstFault
  return (
    <>
      <div data-screen-only>
        <Heading
          crumb={
            <>
              <Link href={`/studies/${encodeURIComponent(code)}/jars`}>Jars of {code}</Link>
            </>
          }
          headline={
            <>
              <b>{chosen.length}</b> {chosen.length === 1 ? 'label' : 'labels'} on{' '}
              {sheets.length === 1 ? 'one sheet' : `${sheets.length} sheets`} of {papers[grid.paper].name}
            </>
          }
          sentence="Print at 100 %, without margins added by the printer. The square holds the jar’s code alone."
          acts={
            <>
              {isReady ? (
                <a href={labelKeys.pdf(code, choice)} data-kind="primary" className="btn" download>
                  Save as PDF
                </a>
              ) : (
                <Button kind="primary" why={fault ?? firstFault ?? 'No jar is left.'}>
                  Save as PDF
                </Button>
              )}
              <Button onClick={() => window.print()} why={isReady ? undefined : 'Nothing to print.'}>
                Print
              </Button>
            </>
          }
        />
        <div className="mt-6 grid items-start gap-4 sm:grid-cols-2 lg:grid-cols-[2fr_1fr_2fr]">
          <Select
            label="Sheet"
            value={choice.sheet}
            options={grids.map(({ key, label }) => ({ value: key, label }))}
            onPick={(sheet) => {
              set({ sheet, first: 1 })
              setTypedFirst('1')
            }}
          />
          <Field
            label="First free label"
            hint={`On a sheet that is begun; counted along the rows, 1 to ${whole}.`}
            inputMode="numeric"
            value={typedFirst}
            onText={(text) => {
              setTypedFirst(text)
              if (/^\d+$/.test(text.trim())) set({ first: Math.min(Math.max(1, Number(text)), whole) })
            }}
            error={firstFault}
          />
          <div className="grid gap-3">
            <Select
              label="Jars"
              value={choice.of}
              options={[
                { value: 'all', label: `All that stand, ${labelledJars(jars).length}` },
                ...stationsOf(jars),
                ...(moved > 0 ? [{ value: 'moved', label: `Moved to another station, ${moved}` }] : []),
                { value: 'jars', label: 'Those I name' },
              ]}
              onPick={(of) => set({ of: of as LabelChoice['of'] })}
            />
            {choice.of === 'jars' ? (
              <Field
                label="Codes of the jars"
                hint="Typed or scanned, with a space or comma between them."
                value={choice.jars}
                onText={(typed) => set({ jars: typed })}
                error={fault ?? undefined}
                className="font-mono"
              />
            ) : null}
          </div>
        </div>
      </div>
      <ol className="label-sheets mt-6 grid gap-6 lg:grid-cols-2 print:mt-0 print:block">
        {sheets.map((labels, at) => (
          <li key={at}>
            <LabelSheet grid={grid} labels={labels} name={`Sheet ${at + 1} of ${sheets.length}`} />
          </li>
        ))}
      </ol>
    </>
  )
}

function stationsOf(jars: LabelledJar[]) {
  const groups = new Map<string, { value: string; name: string; count: number }>()
  for (const jar of labelledJars(jars)) {
    const value = jar.studyStationId ?? 'retains'
    const group = groups.get(value) ?? { value, name: jar.station, count: 0 }
    groups.set(value, { ...group, count: group.count + 1 })
  }
  return [...groups.values()].map(({ value, name, count }) => ({ value, label: `${name}, ${count}` }))
}
