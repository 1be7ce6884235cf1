'use client'

import { EmulsionSection } from '@/components/charts/emulsion-section'
import { PhiRuler } from '@/components/charts/phi-ruler'
import type { DropsFound } from '@/lib/formula/queries/find-drops'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { filmText, innerWord } from '@/lib/formula/rules/finding'
import { formulaTotals, type Amounts, type FormulaTotals } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import { FigureDetails } from '@/components/ui/figure-details'
import { CheckTitle } from './checks-room'
import { answerText } from './checks-words'
import { filmFacts, highInternalFacts, insideFacts } from './formula-facts'

type Props = {
  totals: FormulaTotals
  amounts: readonly Amounts[]
  before: FormulaPage['before']
  drops: FormulaPage['drops']
  checks: FormulaCheck[]
  emulsionType: EmulsionType
  /** Of the version on screen. */
  number: number
}

/** What is inside: the level, a cut through the emulsion to scale, and the questions that point into it. */
export function InsideDrawing({ totals, amounts, before, drops, checks, emulsionType, number }: Props) {
  const { internalVolumePercent: volume, internalMassPercent: mass } = totals
  if (volume === null || mass === null) {
    return (
      <p className="min-w-0 text-15 text-soft xl:row-span-2">
        The cut through the emulsion is drawn as soon as a line has its share and density.
      </p>
    )
  }
  const pointing = checks.filter((check) => check.at !== null)
  const was = before ? formulaTotals(before.lines).internalVolumePercent : null
  return (
    <div className="min-w-0 xl:row-span-2">
      <p className="mb-2 text-15">
        Inside:{' '}
        <FigureDetails
          figure={`${volume.toFixed(1)} %`}
          facts={() => insideFacts(amounts, totals, 'volume')}
          className="font-650"
        />{' '}
        by volume,{' '}
        <FigureDetails
          figure={`${mass.toFixed(1)} %`}
          facts={() => insideFacts(amounts, totals, 'mass')}
          className="font-650"
        />{' '}
        by mass;{' '}
        <FigureDetails
          figure={totals.isHighInternalPhase ? 'a high internal phase' : 'no high internal phase'}
          facts={() => highInternalFacts(amounts, totals)}
        />
      </p>
      <PhiRuler
        phi={volume / 100}
        before={
          before && was !== null
            ? { phi: was / 100, text: `${was.toFixed(1)} in version ${before.number}` }
            : null
        }
      />
      <div className="mt-4">
        <EmulsionSection
          phi={volume / 100}
          inside={innerWord(emulsionType)}
          dropMicrometres={drops?.diameterUm ?? null}
          height={Math.max(494, pointing.length * 150)}
          note={
            drops
              ? `Drops ${drops.diameterUm.toPrecision(2)} micrometres, as measured in ${drops.batchCode}.`
              : undefined
          }
          questions={pointing.map((check) => ({
            id: check.key,
            title: <CheckTitle check={check} />,
            answer: answerText(check, number, mostBeside),
            reason: `${check.reason} [${check.mark}]`,
            isOpen: check.isOpen,
            at: check.at ?? 'film',
          }))}
        />
        {drops ? (
          <FilmNote
            totals={totals}
            drops={drops}
            outside={emulsionType === 'oil-in-water' ? 'water' : 'oil'}
          />
        ) : null}
      </div>
    </div>
  )
}

/** How thin the continuous phase is between packed drops, and what that takes for granted. */
function FilmNote({ totals, drops, outside }: { totals: FormulaTotals; drops: DropsFound; outside: string }) {
  const film = filmText(totals, drops.diameterUm)
  if (!film) return null
  return (
    <p className="max-w-[400px] pt-1 text-13 text-soft">
      The {outside} between two drops is{' '}
      <FigureDetails figure={film} facts={() => filmFacts(totals, drops)} className="text-ink" /> thick on
      average, if all of it lies in even films; the corners hold more, so the films are thinner.
    </p>
  )
}

/** A note beside the drawing is told as far as its pointer has room; the whole is in the question. */
const mostBeside = 90
