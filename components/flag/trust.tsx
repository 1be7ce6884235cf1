import { grouped } from '@/lib/number/rules'
import Link from 'next/link'
import { Hundred } from '@/components/marks/hundred'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import simulated from '@/lib/science/simulated.json'
import { trustLines, type TrustLine } from './trust-lines'

const { figures, studies, seed } = simulated
const whole = (percent: number) => Math.round(percent)

/** What the rules saw in studies whose truth is known, in plain words. */
export function Trust() {
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/flags">Flags</Link>, how far to trust one
          </>
        }
        headline={
          <>
            Of 100 creams that stand still, <b>{whole(figures.steadyFlagged26)}</b> are ever flagged; of 100
            drifts, <b>{whole(figures.driftsSeen26)}</b> are seen four weeks ahead
          </>
        }
        sentence="A flag is a reason to look, not a verdict. These are the odds, counted in made-up studies whose truth is known."
      />
      <div className="mt-8 grid gap-x-12 gap-y-10 lg:grid-cols-3">
        <Shelves
          title="A cream that stands still"
          count={whole(figures.steadyFlagged26)}
          as="leaning"
          rest="steady"
          sentence={`In a half-year study of 15 series ${whole(figures.steadyFlagged26)} of 100 carry a leaning or an out at some time though nothing changed; in a year ${whole(figures.steadyFlagged52)}.`}
        />
        <Shelves
          title="A drift that leaves its band"
          count={100 - whole(figures.driftsSeen26)}
          as="steady"
          rest="leaning"
          sentence={`${whole(figures.driftsSeen26)} of 100 lean at least four weeks before they leave in weeks 16 to 24. The upright ones were seen later.`}
        />
        <Shelves
          title="A day on which an instrument was off"
          count={100 - whole(figures.offDaysNamed)}
          as="leaning"
          rest="steady"
          sentence={`Four times its scatter high or low: on ${whole(figures.offDaysNamed)} of 100 such days the instrument is named and no emulsion is blamed when the day ends.`}
        />
      </div>
      <div className="mt-12 grid gap-10">
        <Section title="What each rule saw">
          <Lines caption="What each rule saw" lines={trustLines.seen(figures)} />
        </Section>
        <Section
          title="Where a band is narrower than the method can tell"
          sentence="The same rules, with more scatter or tighter bands. Nothing changed in these creams either."
        >
          <Lines
            caption="Where a band is narrower than the method can tell"
            lines={trustLines.blurred(figures)}
          />
        </Section>
        <Section title="How it was tried">
          <ul className="grid max-w-[75ch] list-disc gap-2 pl-5 text-15">
            {trustLines.tried.map((line) => (
              <li key={line}>{line}</li>
            ))}
            <li>
              {grouped(studies, 0)} studies a figure, seed {seed}. Anyone can count them again:{' '}
              <code className="font-mono text-13">npm run simulate</code>
            </li>
          </ul>
        </Section>
      </div>
    </>
  )
}

function Shelves({
  title,
  sentence,
  ...marks
}: { title: string; sentence: string } & Omit<Parameters<typeof Hundred>[0], 'title'>) {
  return (
    <section className="min-w-0">
      <h2 className="mb-3 text-20 font-650">{title}</h2>
      <Hundred {...marks} title={sentence} />
      <p className="mt-3 text-15">{sentence}</p>
    </section>
  )
}

function Lines({ caption, lines }: { caption: string; lines: TrustLine[] }) {
  return (
    <Ledger
      caption={caption}
      rows={lines}
      rowKey={(line) => line.what}
      columns={[
        {
          key: 'what',
          title: 'what happened',
          cell: (line) => (
            <>
              {line.what}
              <span className="block text-13 text-soft sm:hidden">{line.means}</span>
            </>
          ),
        },
        {
          key: 'count',
          title: 'in 100',
          align: 'right',
          width: '72px',
          cell: (line) => <span className="tabular-nums font-650">{line.count}</span>,
        },
        { key: 'means', title: 'what that means', from: 'tablet', cell: (line) => line.means },
      ]}
    />
  )
}
