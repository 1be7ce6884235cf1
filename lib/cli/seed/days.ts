import { addHolidays } from '@/lib/holiday/commands'
import { newHolidays } from '@/lib/holiday/schema'
import { newId } from '@/lib/db/id'
import { changeLab } from '@/lib/lab/commands'
import { labToChange } from '@/lib/lab/schema'
import { addDays } from '@/lib/study/rules/calendar'
import { mondayOf } from '@/lib/study/rules/working-days'
import { daysAgo, type Filling } from './context'

/**
 * The lab's days are told last: the stories before are pinned to days that count back from today, so their pulls
 * stay where they are, and those that now stand on closed days are the manager's to move.
 */
export async function fillDays(filling: Filling): Promise<void> {
  const { hedda } = filling.people
  const today = filling.now.toISOString().slice(0, 10)
  const holidays = invented(today).map((one) => ({ id: newId(), ...one }))
  await filling.act(hedda, daysAgo(filling, 1, 10), async (trx) => {
    const { version } = await trx.selectFrom('lab').select('version').executeTakeFirstOrThrow()
    await changeLab(trx, hedda, labToChange.parse({ version, workingDays: [1, 2, 3, 4, 5] }))
    await addHolidays(trx, hedda, newHolidays.parse({ holidays }))
  })
}

/** Company holidays, wherever in the year the demo is filled: none of them is today or within the next two weeks. */
function invented(today: string): { day: string; name: string }[] {
  const monday = mondayOf(today)
  const year = Number(today.slice(0, 4)) + (today.slice(5) >= '12-09' ? 1 : 0)
  const closing = Array.from({ length: 9 }, (_, at) => ({
    day: addDays(`${year}-12-24`, at),
    name: 'Winter closing',
  }))
  return [
    { day: addDays(monday, -37), name: 'Fernhollow outing' },
    { day: addDays(monday, 3 * 7 + 2), name: 'Stocktaking' },
    { day: addDays(monday, 9 * 7 + 4), name: 'Oven service day' },
    ...closing,
  ].filter((one, at, all) => all.findIndex((other) => other.day === one.day) === at)
}
