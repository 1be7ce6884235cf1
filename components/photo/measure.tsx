'use client'

import { useState, type KeyboardEvent } from 'react'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { Busy } from '@/components/ui/busy'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { PhotoLinesOfReading } from '@/lib/reading/schema/photo-lines'
import { separationOfLines, type PhotoLines } from '@/lib/science/photo-lines'
import { DragPicture } from './drag-picture'
import { firstLines, lineNames, lineOrder, moved, type Line } from './lines'
import { MarkTable } from './mark-table'
import { Nudge } from './nudge'
import { SureWords } from './sure-words'
import { useMeasuring, type PhotoToMeasure } from './use-measuring'

type Props = {
  jar: BenchJarPage
  photo: PhotoToMeasure
  onUse: (lines: PhotoLinesOfReading) => void
  onClose: () => void
}

/** Four lines on a photo, proposed by the server and decided by a hand; heights and percent follow. */
export default function Measure({ jar, photo, onUse, onClose }: Props) {
  const { copy, proposing, isUnreadable } = useMeasuring(photo)
  const [byHand, setByHand] = useState<PhotoLines | null>(null)
  const [picked, setPicked] = useState<Line>('topEdge')
  const proposal = proposing.state === 'there' ? proposing.proposal : null
  const lines = byHand ?? proposal?.lines ?? (copy ? firstLines(copy.height) : null)
  const fillMm = jar.fillHeightMm ?? 0

  if (!copy || !lines)
    return (
      <Dialog isOpen onClose={onClose} title="Measure on the photo" density="bench">
        {isUnreadable ? (
          <p role="alert">
            This photo cannot be opened here. Take it again, or measure the layers with the ruler.
          </p>
        ) : (
          <p role="status" className="flex items-center gap-3">
            <Busy /> The photo is being opened.
          </p>
        )}
      </Dialog>
    )

  const axisX = proposal?.jar?.x ?? copy.width / 2
  const tiltDegrees = proposal?.jar?.tiltDegrees ?? 0
  const { topPercent, bottomPercent, percent } = separationOfLines(lines)
  const move = (line: Line, row: number) => setByHand(moved(lines, line, row, copy.height))
  const nudge = (by: number) => move(picked, lines[picked] + by)

  function onKey(event: KeyboardEvent) {
    const step = event.shiftKey ? 10 : 1
    const by = { ArrowUp: -step, ArrowDown: step, PageUp: -10, PageDown: 10 }[event.key]
    if (by === undefined) return
    event.preventDefault()
    nudge(by)
  }

  const mm = (share: number) => ((share / 100) * fillMm).toFixed(1)
  const told: Record<Line, string> = {
    fillTop: `${fillMm.toFixed(1)} mm above the base`,
    topEdge: topPercent === 0 ? 'no oil on top' : `${mm(topPercent)} mm of oil, ${topPercent.toFixed(1)} %`,
    bottomEdge:
      bottomPercent === 0
        ? 'no water below'
        : `${mm(bottomPercent)} mm of water, ${bottomPercent.toFixed(1)} %`,
    base: 'where the fill stands on the glass',
  }

  return (
    <MarkTable
      title={`Measure on the photo: ${jar.name}`}
      onClose={onClose}
      picture={
        <DragPicture
          {...{ copy, lines, axisX, tiltDegrees, picked }}
          alt={`Jar ${jar.code} with the lines that are being set`}
          onPick={setPicked}
          onMove={move}
        />
      }
      tools={
        <>
          <SureWords proposing={proposing} isMoved={byHand !== null} isSent={photo.isSent} />
          <div
            role="group"
            aria-label="Lines"
            className="grid gap-3 max-sm:grid-cols-2 [@media(max-height:500px)]:grid-cols-2"
          >
            {lineOrder.map((line) => (
              <div
                key={line}
                role="slider"
                tabIndex={0}
                aria-label={lineNames[line]}
                aria-orientation="vertical"
                aria-valuemin={0}
                aria-valuemax={copy.height}
                aria-valuenow={Math.round(lines[line])}
                aria-valuetext={told[line]}
                onFocus={() => setPicked(line)}
                onClick={() => setPicked(line)}
                onKeyDown={onKey}
                className={`flex min-h-16 cursor-pointer flex-col justify-center rounded px-4 py-1 ${picked === line ? 'border-[3px] border-ink bg-typed' : 'border-2 border-rule bg-paper'}`}
              >
                <b className="text-18">{lineNames[line]}</b>
                <span className="text-17">{told[line]}</span>
              </div>
            ))}
          </div>
          <div className="grid grid-cols-4 gap-3" role="group" aria-label={`Move ${lineNames[picked]}`}>
            <Nudge label="up 10" says={`${lineNames[picked]} up ten pixels`} onPress={() => nudge(-10)} />
            <Nudge label="up 1" says={`${lineNames[picked]} up one pixel`} onPress={() => nudge(-1)} />
            <Nudge label="down 1" says={`${lineNames[picked]} down one pixel`} onPress={() => nudge(1)} />
            <Nudge label="down 10" says={`${lineNames[picked]} down ten pixels`} onPress={() => nudge(10)} />
          </div>
          {byHand && proposal?.lines ? (
            <Button density="bench" onClick={() => setByHand(null)}>
              Back to the proposal
            </Button>
          ) : null}
        </>
      }
      told={
        <div className="flex items-center gap-4">
          <div className="max-sm:hidden">
            <JarGlyph height={64} state="drawn" topPercent={topPercent} bottomPercent={bottomPercent} />
          </div>
          <p>
            <span className="block text-17">Separation</span>
            <b className="text-36 leading-none">{percent.toFixed(1)}</b> <span className="text-24">%</span>
          </p>
        </div>
      }
      act={
        <Button
          density="bench"
          kind="primary"
          {...(byHand || proposal?.lines ? {} : { why: 'Set at least one line first.' })}
          onClick={() =>
            onUse({
              ...{ photoId: photo.id, width: copy.width, height: copy.height },
              ...{ lines, axisX, tiltDegrees },
              proposal: proposal && {
                sureness: proposal.sureness,
                reasons: proposal.reasons,
                lines: proposal.lines,
              },
            })
          }
        >
          Use these lines
        </Button>
      }
    />
  )
}
