import Link from 'next/link'
import type { ReactNode } from 'react'
import { conditionsText } from '@/components/formula/read-steps'
import { Heading } from '@/components/ui/heading'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { stepCautions } from '@/lib/batch/rules/steps'
import { gramsText, toleranceGrams, toleranceWords } from '@/lib/batch/rules/weighing'
import { dayText } from '@/lib/report/rules'
import { percentText } from '@/lib/formula/rules/numbers'
import { grouped } from '@/lib/number/rules'
import { PrintButton } from './print-button'

/** The batch as a sheet to write on: targets and steps printed, everything else blank. */
export function PaperSheet({ batch }: { batch: BatchPage }) {
  return (
    <>
      <div data-screen-only>
        <Heading
          crumb={
            <>
              <Link href={`/batches/${encodeURIComponent(batch.code)}`}>{batch.code}</Link> · Paper sheet
            </>
          }
          headline={
            <>
              <b>{batch.weighings.length}</b> lines and <b>{batch.steps.length}</b> steps to write on
            </>
          }
          sentence="Typed in later with “Typed in from paper” and the time that stands on the sheet."
          acts={<PrintButton />}
        />
      </div>
      <article className="paper-sheet mt-6 max-w-[190mm] text-15 print:mt-0 print:max-w-none print:text-[10.5pt]">
        <header className="flex items-baseline justify-between gap-6 border-b-[3px] border-ink pb-1">
          <h2 className="text-24 font-700 print:text-20">
            <span className="font-mono">{batch.code}</span>, {batch.formulaName}
          </h2>
          <p className="whitespace-nowrap">
            version {batch.versionNumber}, {grouped(batch.sizeG, 0)} g, printed {dayText(batch.today)}
          </p>
        </header>
        <div className="grid grid-cols-3 gap-6 py-3">
          <Blank label="Made by" />
          <Blank label="Date" />
          <Blank label="Balance, its check today" />
        </div>
        <Weighing batch={batch} />
        <Steps batch={batch} />
        <Checks batch={batch} />
      </article>
    </>
  )
}

function Weighing({ batch }: { batch: BatchPage }) {
  return (
    <Part title={`Weighing, within ${toleranceWords(batch)} and never under 0.01 g`}>
      <Table
        caption="Weighing sheet"
        heads={['Phase', 'Ingredient', '%', 'Target g', 'Allowed', 'Lot', 'Tare g', 'Net g', 'Time', 'By']}
        rights={[2, 3, 4]}
        rows={batch.weighings.map((line) => {
          const off = toleranceGrams(line.targetG, batch.tolerancePercent)
          return [
            <b key="phase">{line.phase}</b>,
            <>
              {line.inciName.replaceAll('/', '/\u200b')}
              {line.caution ? <span className="block font-650">{line.caution}</span> : null}
            </>,
            percentText(line.percentThousandths),
            <b key="target">{gramsText(line.targetG)}</b>,
            `±\u00a0${gramsText(off)}`,
            ...['', '', '', '', ''],
          ]
        })}
        widths={['6%', '25%', '8%', '11%', '10%', '11%', '8%', '9%', '6%', '6%']}
      />
    </Part>
  )
}

function Steps({ batch }: { batch: BatchPage }) {
  if (!batch.steps.length) return null
  return (
    <Part title="Process: what was done otherwise than prescribed is explained on its line">
      <Table
        caption="Process steps"
        heads={['No.', 'Step, as prescribed', 'Begin', 'End', 'rpm', 'min', '°C', 'Otherwise, and why', 'By']}
        rows={batch.steps.map((step, index) => [
          <b key="number">{index + 1}</b>,
          <>
            {step.phase ? <b>{step.phase}. </b> : null}
            {step.instruction}
            <span className="block text-soft">{conditionsText(step)}</span>
            {step.lookFor ? <span className="block">Look for: {step.lookFor}</span> : null}
            {stepCautions(step).map((caution) => (
              <span key={caution} className="block font-650">
                {caution}
              </span>
            ))}
          </>,
          ...['', '', '', '', '', '', ''],
        ])}
        widths={['5%', '37%', '8%', '8%', '8%', '7%', '7%', '14%', '6%']}
      />
    </Part>
  )
}

function Checks({ batch }: { batch: BatchPage }) {
  return (
    <Part title="Checks, yield, rest">
      <div className="grid grid-cols-2 gap-x-6 gap-y-3 pt-1 sm:grid-cols-3 print:grid-cols-3">
        {[
          'Look while made',
          'Temperature at the end, °C',
          'pH in process',
          `Yield, g of ${grouped(batch.sizeG, 0)} g`,
          'Fill of a jar, g',
          'Jar and closure',
          'Emulsion type by dilution, conductivity or dye',
          'It showed',
          'Conductivity, microsiemens per cm',
          'Rested from',
          'Rested to (24 to 72 h)',
          'Read by',
        ].map((label) => (
          <Blank key={label} label={label} />
        ))}
      </div>
      <div className="pt-4">
        <Table
          caption="Initial readings"
          heads={['Initial', '1', '2', '3', 'With what, how', 'Time', 'By']}
          rows={[
            'Look',
            'pH',
            'Viscosity, torque % or mPa·s',
            'Density, g/mL',
            'Centrifuge: rpm, radius mm, min, % separated',
          ].map((what) => [what, '', '', '', '', '', ''])}
          widths={['30%', '11%', '11%', '11%', '22%', '8%', '7%']}
        />
      </div>
      <div className="pt-4">
        <Table
          caption="Filled jars"
          heads={['Jar', 'Empty g', 'Full g', 'Torque Nm', 'Jar', 'Empty g', 'Full g', 'Torque Nm']}
          rows={[
            ['1', '', '', '', '11', '', '', ''],
            ['', '', '', '', '', '', '', ''],
            ['', '', '', '', '', '', '', ''],
          ]}
          widths={Array.from({ length: 8 }, () => '12.5%')}
        />
      </div>
    </Part>
  )
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="pt-4">
      <h3 className="break-after-avoid pb-1 text-17 font-650">{title}</h3>
      {children}
    </section>
  )
}

type TableProps = {
  caption: string
  heads: string[]
  rows: ReactNode[][]
  widths: string[]
  rights?: number[]
}

function Table({ caption, heads, rows, widths, rights = [] }: TableProps) {
  const side = (index: number) => (rights.includes(index) ? 'text-right whitespace-nowrap' : 'text-left')
  return (
    <div tabIndex={0} role="region" aria-label={caption} className="overflow-x-auto print:overflow-visible">
      <table className="w-full min-w-[720px] table-fixed border-collapse print:min-w-0">
        <caption className="sr-only">{caption}</caption>
        <colgroup>
          {widths.map((width, index) => (
            <col key={index} style={{ width }} />
          ))}
        </colgroup>
        <thead>
          <tr>
            {heads.map((head, index) => (
              <th
                key={index}
                scope="col"
                className={`border-b-2 border-ink px-1 py-1 align-bottom text-13 font-600 print:text-[8.5pt] ${side(index)}`}
              >
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            <tr key={index} className="h-[9mm] break-inside-avoid">
              {row.map((cell, at) => (
                <td
                  key={at}
                  className={`border-b border-l border-rule px-1 py-1 align-top leading-tight first:border-l-0 [overflow-wrap:anywhere] ${side(at)}`}
                >
                  {cell}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}

function Blank({ label }: { label: string }) {
  return (
    <div className="flex min-h-[12mm] flex-col justify-between border-b border-ink pb-[6mm]">
      <span className="text-13 text-soft print:text-[8.5pt]">{label}</span>
    </div>
  )
}
