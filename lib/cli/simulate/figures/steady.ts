import { hottest, shareOfHottest, type Lab, type Method } from '../lab'
import { runStudy, type Run, type Truth } from '../run'
import type { Figure } from './figure'

export function carriesFlag(run: Run): boolean {
  return run.standings.some((station) =>
    station.some((standing) => standing === 'leaning' || standing === 'out'),
  )
}

/** Nothing changes: every flag is false, and every day named is wrongly named. */
export function unchanging(name: string, lab: Lab, weeks: number, studies: number): Figure {
  return {
    name,
    studies,
    study: (chance, count) => {
      let isFlagged = false
      for (const method of Object.values(lab)) {
        const run = runStudy({ chance, method, weeks, truth: () => 0 })
        if (carriesFlag(run)) {
          isFlagged = true
          count(`flagged ${method.attribute}`)
        }
        if (method.attribute !== 'separation') {
          count('days', weeks)
          count('named days', run.named.length)
        }
      }
      count('studies')
      if (isFlagged) count('flagged')
    },
  }
}

/** Share of the band that is used at the hottest station at most. */
const harmlessShare = 0.2
const settlingWeeks = 3

/** Every series changes, slowly and by at most a fifth of its band. */
export function harmless(
  name: string,
  lab: Lab,
  weeks: number,
  shape: 'linear' | 'settling',
  studies: number,
): Figure {
  return {
    name,
    studies,
    study: (chance, count) => {
      let isFlagged = false
      for (const method of Object.values(lab)) {
        const reach = harmlessShare * method.room * (method.isOneSided ? 1 : chance.sign())
        const course = (week: number) =>
          shape === 'linear' ? week / weeks : 1 - Math.exp(-week / settlingWeeks)
        const truth: Truth = (station, week) => reach * shareOfHottest(station) * course(week)
        if (carriesFlag(runStudy({ chance, method, weeks, truth }))) isFlagged = true
      }
      count('studies')
      if (isFlagged) count('flagged')
    },
  }
}

/** Weeks before leaving by which a drift should lean. */
export const weeksAhead = 4
/** Where a first-order drift would end, in bands. */
const endsAt = 1.5

/** One attribute drifts and leaves its band at the hottest station; seen where that series leans four weeks before. */
export function drift(
  name: string,
  method: Method,
  weeks: number,
  shape: 'linear' | 'first order',
  latest: number,
  studies: number,
): Figure {
  return {
    name,
    studies,
    study: (chance, count) => {
      const leaves = chance.between(16, latest)
      const direction = method.isOneSided ? 1 : chance.sign()
      const rate = -Math.log(1 - 1 / endsAt) / leaves
      const truth: Truth = (station, week) => {
        const aged = week * shareOfHottest(station)
        return (
          direction *
          method.room *
          (shape === 'linear' ? aged / leaves : endsAt * (1 - Math.exp(-rate * aged)))
        )
      }
      const run = runStudy({ chance, method, weeks, until: Math.floor(leaves - weeksAhead), truth })
      count('studies')
      if (run.standings[hottest]!.some((standing) => standing === 'leaning' || standing === 'out'))
        count('seen')
    },
  }
}
