import { Ledger } from '@/components/ui/ledger'
import { askedWeeks, setAsideJars, stationName } from '@/lib/protocol/rules/plan'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { gramsOfJars } from '@/lib/science/jar-grams'
import { grouped } from '@/lib/number/rules'
import { capital } from '@/lib/study/rules/words'

type Row = { name: string; watch: number; measuring: number; spare: number; kept: number }

/** Jars of one batch by kind and station, with the grams that they take. */
export function JarTable({ plan, of }: { plan: ProtocolPlan; of: string }) {
  const rows = rowsOf(plan)
  const sum = (key: Exclude<keyof Row, 'name'>) => rows.reduce((total, row) => total + row[key], 0)
  const total: Row = {
    name: 'All',
    watch: sum('watch'),
    measuring: sum('measuring'),
    spare: sum('spare'),
    kept: sum('kept'),
  }
  const column = (key: Exclude<keyof Row, 'name'>, title: string) => ({
    key,
    title,
    align: 'right' as const,
    cell: (row: Row) => (row[key] === 0 ? '' : row[key]),
  })
  return (
    <div className="mt-4">
      <Ledger
        caption={`Jars of ${of} by kind and station`}
        rows={[...rows, total]}
        rowKey={(row) => row.name}
        columns={[
          { key: 'name', title: 'Where', cell: (row) => (row === total ? <b>All</b> : row.name) },
          column('watch', 'watch'),
          column('measuring', 'measuring'),
          column('spare', 'spare'),
          column('kept', 'kept'),
          { key: 'jars', title: 'jars', align: 'right', cell: (row) => <b>{jarsOf(row)}</b> },
          {
            key: 'grams',
            title: 'g',
            align: 'right',
            cell: (row) => grouped(Math.ceil(gramsOfJars(jarsOf(row), plan.fillG, plan.lossPercent)), 0),
          },
        ]}
      />
    </div>
  )
}

function jarsOf({ watch, measuring, spare, kept }: Row): number {
  return watch + measuring + spare + kept
}

function rowsOf(plan: ProtocolPlan): Row[] {
  const none = { watch: 0, measuring: 0, spare: 0, kept: 0 }
  const names = new Map<string, number>()
  return [
    ...plan.stations.map((station, index) => {
      const name = stationName(station, index)
      const same = (names.get(name) ?? 0) + 1
      names.set(name, same)
      return {
        name: capital(same === 1 ? name : `${name}, ${same}`),
        watch: station.watchJars,
        measuring: station.measuringJarsPerPull * askedWeeks(plan, station, 'measuring').length,
        spare: station.spares,
        kept: 0,
      }
    }),
    { ...none, name: 'Initial', measuring: plan.initialJars },
    { ...none, name: 'Retained', kept: plan.retains },
    { ...none, name: 'Set aside for outside laboratories', kept: setAsideJars(plan) },
  ].filter((row) => jarsOf(row) > 0)
}
