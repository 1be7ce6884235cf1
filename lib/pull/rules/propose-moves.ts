import { nominalDay } from '@/lib/study/rules/calendar'
import { layOut, whyClosed, type LabCalendar } from '@/lib/study/rules/working-days'

export type PullOnClosedDay = {
  pullId: string
  studyCode: string
  startedOn: string
  studyStationId: string
  label: string
  timeWeeks: number
  dueOn: string
  windowFrom: string
  windowTo: string
  stationName: string
  temperatureC: number | null
  isFreezeThaw: boolean
  variant: string
  /** Days inside its window on which the same station has another pull. */
  taken: string[]
}

/** To which day each could move; null where no day of its window would do. Two of one station never get the same. */
export function proposeMoves(pulls: PullOnClosedDay[], calendar: LabCalendar, today: string) {
  const given = new Map<string, string[]>()
  return pulls.map(({ taken, startedOn, ...pull }) => {
    const used = given.get(pull.studyStationId) ?? []
    const nominalOn = nominalDay(startedOn, pull.timeWeeks)
    const [laid] = layOut([{ nominalOn, windowFrom: pull.windowFrom, windowTo: pull.windowTo }], calendar, {
      notBefore: today,
      taken: [...taken, ...used],
    })
    const to = laid!.isStuck ? null : laid!.dueOn
    if (to !== null) given.set(pull.studyStationId, [...used, to])
    return { ...pull, nominalOn, because: whyClosed(calendar, pull.dueOn) ?? '', to }
  })
}
