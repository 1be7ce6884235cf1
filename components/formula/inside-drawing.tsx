'use client'

import { EmulsionSection } from '@/components/charts/emulsion-section'
import { PhiRuler } from '@/components/charts/phi-ruler'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { innerWord } from '@/lib/formula/rules/finding'
import { formulaTotals, type Amounts, type FormulaTotals } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import { FigureDetails } from '@/components/ui/figure-details'
import { Checks } from './checks'
import { highInternalFacts, insideFacts } from './formula-facts'

type Props = {
  totals: FormulaTotals
  amounts: readonly Amounts[]
  before: FormulaPage['before']
  checks: FormulaCheck[]
  emulsionType: EmulsionType
}

/** What is inside: the level, a cut through the emulsion to scale, and the questions that point into it. */
export function InsideDrawing({ totals, amounts, before, checks, emulsionType }: Props) {
  const { internalVolumePercent: volume, internalMassPercent: mass } = totals
  if (volume === null || mass === null) {
    return (
      <div className="min-w-0">
        <p className="mb-6 text-15 text-soft">
          The cut through the emulsion is drawn as soon as a line has its share and density.
        </p>
        <Checks checks={checks} />
      </div>
    )
  }
  const pointing = checks.filter((check) => !beside.includes(check.key))
  const others = checks.filter((check) => beside.includes(check.key))
  const was = before ? formulaTotals(before.lines).internalVolumePercent : null
  return (
    <div className="min-w-0">
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
          dropMicrometres={null}
          height={Math.max(494, pointing.length * 126)}
          note="The size of the drops has not been measured."
          questions={pointing.map((check) => ({
            id: check.key,
            title: check.question,
            answer: check.answer,
            reason: check.reason,
            isOpen: check.isOpen,
            at: drops.includes(check.key) ? 'drop' : 'film',
          }))}
        />
      </div>
      {others.length ? (
        <div className="mt-6">
          <Checks checks={others} />
        </div>
      ) : null}
    </div>
  )
}

/** Questions about what is in the drops; the others are about the film between them. */
const drops: FormulaCheck['key'][] = ['gel', 'slow']
/** Five questions fit beside the drawing; what is dissolved in the drops cannot be pointed at. */
const beside: FormulaCheck['key'][] = ['salt', 'agree']
