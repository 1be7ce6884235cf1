import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { CheckTitle } from './checks-room'
import { aboutText, answerText } from './checks-words'

type Props = {
  checks: FormulaCheck[]
  /** Of the version on screen. */
  number: number
  className?: string
}

/** Questions with a reason each; what neither the formula nor a person answers is open, in the alarm colour. */
export function Checks({ checks, number, className }: Props) {
  return (
    <ul className={className ?? 'flex flex-col gap-4'}>
      {checks.map((check) => (
        <li key={check.key} className="relative break-inside-avoid pl-5">
          <svg
            viewBox="0 0 20 12"
            width="20"
            height="12"
            aria-hidden
            className="absolute left-[-8px] top-1.5"
          >
            <path d="M8 6H20" stroke={check.isOpen ? 'var(--alarm)' : 'var(--ink)'} strokeWidth="1.5" />
            <circle cx="6" cy="6" r="4.5" fill={check.isOpen ? 'var(--alarm)' : 'var(--ink)'} />
          </svg>
          <p className="font-650">
            <CheckTitle check={check} />
          </p>
          <p className={`[overflow-wrap:anywhere] ${check.isOpen ? 'font-650 text-alarm' : ''}`}>
            {answerText(check, number)}
          </p>
          <p className="text-14 text-soft [overflow-wrap:anywhere]">
            {check.reason} {aboutText(check)} <span className="whitespace-nowrap">[{check.mark}]</span>
          </p>
        </li>
      ))}
    </ul>
  )
}
