'use client'

import { useState } from 'react'
import { markWords, type FigureFacts, type Mark } from '@/lib/science/methods/method'
import { Button } from './button'

/** Formula, inputs as used, result to the last digit, source with its mark, and how to make it again outside. */
export function FigureFactsPanel({ facts }: { facts: FigureFacts }) {
  const { name, result, formula, inputs, sources, when, recheck } = facts
  return (
    <div className="text-15">
      <div className="px-5 pb-3 pr-12 pt-3.5">
        <p className="text-13 text-soft">{name}</p>
        <p className="text-20 font-700 leading-tight [overflow-wrap:anywhere]">{result}</p>
        {when ? <p className="mt-0.5 text-13 text-soft">{when}</p> : null}
      </div>
      <div className="border-y border-hair bg-recess px-5 py-2.5">
        {formula.map((line) => (
          <p key={line} className="py-0.5 leading-snug">
            {line}
          </p>
        ))}
      </div>
      {inputs.length > 0 ? (
        <dl className="px-5 pt-1.5">
          {inputs.map(({ says, value }) => (
            <div
              key={says}
              className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-hair py-1.5"
            >
              <dt className="text-soft">{says}</dt>
              <dd className="ml-auto min-w-0 text-right font-560 [overflow-wrap:anywhere]">{value}</dd>
            </div>
          ))}
        </dl>
      ) : null}
      <ul className="px-5 py-2.5" aria-label="Sources">
        {sources.map(({ text, mark }) => (
          <li key={text} className="relative py-1 pl-10 leading-snug">
            <MarkLine mark={mark} />
            {text}: <b className="font-650">{markWords[mark]}</b>
          </li>
        ))}
      </ul>
      {recheck ? <Recheck {...recheck} /> : null}
    </div>
  )
}

/** As firm as what is said: a shelf, a thin one, dashed, dotted. */
function MarkLine({ mark }: { mark: Mark }) {
  const [width, dashes] = lines[mark]
  return (
    <svg viewBox="0 0 28 6" width="28" height="6" aria-hidden className="absolute left-0 top-[0.78rem]">
      <path
        d="M1 3H27"
        stroke="currentColor"
        strokeWidth={width}
        strokeDasharray={dashes}
        strokeLinecap="butt"
      />
    </svg>
  )
}

const lines: Record<Mark, [number, string | undefined]> = {
  standard: [4, undefined],
  handbook: [1.75, undefined],
  practice: [1.75, '6 4'],
  memory: [1.75, '1.75 3'],
}

function Recheck({ topic, input }: { topic: string; input: unknown }) {
  const [said, setSaid] = useState('')
  const text = JSON.stringify(input)
  async function copy() {
    try {
      await navigator.clipboard.writeText(text)
      setSaid('Copied.')
    } catch {
      setSaid('The browser keeps its clipboard; mark the text and copy it.')
    }
  }
  return (
    <div className="border-t border-hair bg-recess px-5 pb-4 pt-3">
      <p className="font-650">Recheck outside</p>
      <p className="mt-0.5">
        <code className="font-mono text-14 [overflow-wrap:anywhere]">npm run --silent calc -- {topic}</code>,
        with this input:
      </p>
      <pre
        tabIndex={0}
        role="region"
        aria-label={`Input of calc ${topic}`}
        className="mt-2 max-h-24 overflow-y-auto whitespace-pre-wrap bg-paper px-2 py-1.5 font-mono text-13 [overflow-wrap:anywhere]"
      >
        {text}
      </pre>
      <div className="mt-2.5 flex flex-wrap items-center gap-3">
        <Button onClick={() => void copy()}>Copy the input</Button>
        <span role="status" className="text-13">
          {said}
        </span>
      </div>
    </div>
  )
}
