import { doubtOnEntry } from '../../../science/entry'
import { decimalSlip, hottest, measured, shareOfHottest, stations, type Lab } from '../lab'
import { runStudy } from '../run'
import type { Figure } from './figure'

const offBy = 4
const firstOffWeek = 3

/** One day on which the instrument read four SDs high or low while nothing changed. */
export function offDays(name: string, lab: Lab, weeks: number, studies: number): Figure {
  return {
    name,
    studies,
    study: (chance, count) => {
      for (const method of [lab.ph, lab.viscosity]) {
        const week = firstOffWeek + chance.below(weeks - firstOffWeek + 1)
        const sign = chance.sign()
        const run = runStudy({
          chance,
          method,
          weeks,
          until: week,
          truth: () => 0,
          offDay: { week, by: sign * offBy },
        })
        const direction = sign > 0 ? 'high' : 'low'
        const isNamed = run.named.some((day) => day.week === week && day.direction === direction)
        const isFlagged = stations.some((_, i) => {
          const before = run.standings[i]![week - 2]
          const after = run.standings[i]![week - 1]
          const isNew = after !== before && (after === 'leaning' || after === 'out')
          return isNew || (run.edges[i]![week - 1]! && !run.edges[i]![week - 2]!)
        })
        count('days')
        count(`days ${method.attribute}`)
        if (isNamed && !isFlagged) {
          count('named and none flagged')
          count(`named and none flagged ${method.attribute}`)
        }
      }
    },
  }
}

/** A decimal point slips as a value is typed, in a study that stands still or drifts. */
export function slips(name: string, lab: Lab, weeks: number, studies: number): Figure {
  return {
    name,
    studies,
    study: (chance, count) => {
      for (const method of Object.values(lab)) {
        const until = 1 + chance.below(weeks - 1)
        const reach = chance.happens(0.5) ? method.room * (method.isOneSided ? 1 : chance.sign()) : 0
        const truth = (station: number, week: number) => (reach * shareOfHottest(station) * week) / weeks
        const run = runStudy({ chance, method, weeks, until, truth })
        const walk = run.walks[hottest]!
        const values = measured(chance, method, method.start + truth(hottest, until + 1), 0)
        const slipped = method.shown(decimalSlip(chance, values[0]!))
        if (slipped === values[0]) continue
        const doubts = doubtOnEntry(
          {
            attribute: method.attribute,
            tolerance: method.tolerance,
            endTime: weeks,
            repeatabilitySd: walk.frame.repeatabilitySd,
            isSeparation: method.isOneSided,
            initial: [walk.frame.initial],
            readings: walk.counted
              .filter((point) => !point.isInitial)
              .map((point) => ({
                id: point.day!,
                time: point.time,
                day: point.day!,
                jar: point.day!,
                values: Array<number>(method.replicates).fill(point.mean),
                doubts: [],
              })),
          },
          { time: until + 1, values: [slipped, ...values.slice(1)] },
        )
        count('slips')
        count(`slips ${method.attribute}`)
        if (doubts.length === 0) continue
        count('doubted')
        count(`doubted ${method.attribute}`)
      }
    },
  }
}
