import Link from 'next/link'
import { Section } from '@/components/ui/section'
import { percentText } from '@/lib/formula/rules/numbers'
import { familyGrid } from '@/lib/formula/rules/variants'
import type { Family } from '@/lib/formula/queries/list-families'
import { MakeFamily } from './make-family'
import { compareAddress } from '@/lib/formula/keys'
import { mostCompared } from '@/lib/formula/schema'

type Props = { family: Family; code: string; mayMake: boolean }

/** A family of prototypes as the grid they were varied over; the one that is open stands out in ink. */
export function FamilyPart({ family, code, mayMake }: Props) {
  const grid = familyGrid(family.members)
  if (!grid) return null
  const codes = [family.base.code, ...family.members.map((member) => member.code)]
  return (
    <Section
      className="mt-8"
      title={
        <>
          Family of{' '}
          <Link
            href={`/formulas/${family.base.code}?version=${family.base.number}`}
            className="underline underline-offset-4"
          >
            {family.base.code}, version {family.base.number}
          </Link>
        </>
      }
      aside={
        <span className="flex flex-wrap gap-x-5 font-650 [&_a]:underline [&_a]:underline-offset-4">
          {family.base.code === code ? null : (
            <Link
              href={`/formulas/${family.base.code}/difference?${new URLSearchParams({ from: String(family.base.number), with: code })}`}
            >
              Difference to the base
            </Link>
          )}
          {mayMake ? (
            <MakeFamily base={family.base.code} codes={family.members.map((member) => member.code)} />
          ) : null}
          <Link href={compareAddress(codes.slice(0, mostCompared))}>Compare where they stand</Link>
        </span>
      }
    >
      <div className="relative overflow-x-auto" tabIndex={0} role="region" aria-label="Family grid">
        <table className="border-collapse text-15">
          <caption className="sr-only">Members of the family by level</caption>
          <thead>
            {grid.columnName ? (
              <tr className="text-13 text-soft">
                <th scope="col" className="pr-6 text-left font-430">
                  {grid.rowName}
                </th>
                <th scope="colgroup" colSpan={grid.columns.length} className="px-3 text-left font-430">
                  {grid.columnName}
                </th>
              </tr>
            ) : null}
            <tr className="border-b border-ink text-13 text-soft">
              <th scope="col" className="pr-6 pb-1 text-left font-430">
                {grid.columnName ? <span className="sr-only">level</span> : grid.rowName}
              </th>
              {grid.columns.map((column) => (
                <th key={column} scope="col" className="px-3 pb-1 text-left font-430">
                  {column === null ? 'formula' : `${percentText(column)} %`}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {grid.rows.map((row) => (
              <tr key={row.level} className="border-b border-hair">
                <th scope="row" className="h-9 pr-6 text-left font-430">
                  {percentText(row.level)} %
                </th>
                {row.codes.map((own, index) => (
                  <td key={index} className="px-3">
                    {own.map((one) => (
                      <Link
                        key={one}
                        href={`/formulas/${one}`}
                        aria-current={one === code ? 'page' : undefined}
                        className={`mr-2 font-mono underline-offset-4 hover:underline ${one === code ? 'font-750' : 'text-soft'}`}
                      >
                        {one}
                      </Link>
                    ))}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </Section>
  )
}
