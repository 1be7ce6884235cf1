import { sideOf } from '@/lib/science/temperature-log'
import { capital, counted, numberWord } from '@/lib/study/rules/words'

type Read = {
  name: string
  isActive: boolean
  lowC: number | null
  highC: number | null
  lastC: number | null
}
export type StationsFinding = { strong: string; rest: string; sentence: string | null }

/** What the last reading of each station in use says, as the list's headline; what was never read is told, not praised. */
export function stationsFinding(stations: readonly Read[]): StationsFinding {
  const used = stations.filter((one) => one.isActive)
  const unread = used.filter((one) => one.lastC === null)
  const outside = used.filter((one) => one.lastC !== null && sideOf(one, one.lastC) !== null)
  const waits =
    unread.length === 0
      ? null
      : `${capital(counted(unread.length, 'station'))} ${unread.length === 1 ? 'was' : 'were'} never read; what jars there went through is not known.`
  if (stations.length === 0) return { strong: '', rest: 'No station is here yet', sentence: null }
  if (used.length === 0) return { strong: 'No station', rest: ' is in use', sentence: null }
  if (outside.length > 0) {
    return {
      strong: `${capital(numberWord(outside.length))} of ${used.length}`,
      rest: ` stations ${outside.length === 1 ? 'is outside its' : 'are outside their'} limits`,
      sentence: [`${outside.map((one) => one.name).join(', ')}: look at the record, then at the jars.`, waits]
        .filter((part) => part !== null)
        .join(' '),
    }
  }
  if (unread.length === used.length) {
    return {
      strong: 'No station',
      rest: ' has been read yet',
      sentence: 'Until a temperature is logged, what the jars there go through is not known.',
    }
  }
  if (unread.length === 0) {
    return { strong: 'Every station', rest: ' was inside its limits when last read', sentence: null }
  }
  const read = used.length - unread.length
  return {
    strong: `${capital(numberWord(read))} of ${used.length}`,
    rest: ` stations ${read === 1 ? 'was inside its' : 'were inside their'} limits when last read`,
    sentence: waits,
  }
}
