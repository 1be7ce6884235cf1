import { answerFlag } from '@/lib/flag/commands/answer'
import { setAside } from '@/lib/flag/commands/set-aside'
import { flagSource, type FlagLine } from '@/lib/flag/queries/list'
import { flagList } from '@/lib/flag/rules/list'
import { everyRow } from '@/lib/list/queries/every-row'
import { daysAgo, type Filling } from './context'

/** Old flags were answered in their time; what was raised in the last weeks still waits for somebody. */
export async function answerFlags(filling: Filling): Promise<void> {
  const { liv, rune } = filling.people
  const all = flagList.query.parse({ state: 'open', sort: 'number' })
  const open: FlagLine[] = []
  for await (const flag of everyRow(filling.db, flagSource(filling.db, liv, all), all)) open.push(flag)
  const recent = daysAgo(filling, 16)
  for (const flag of open) {
    const raised = new Date(flag.raisedAt)
    if (raised > recent) continue
    const at = new Date(raised.getTime() + 20 * 3600_000)
    const who = flag.level === 'out' ? rune : liv
    if (flag.level === 'doubt' && flag.instrumentCode === null) {
      await filling.act(liv, at, (trx) =>
        setAside(trx, liv, flag.number, {
          version: flag.version,
          settles: 'doubt',
          cause: 'product',
          why: 'The repeat and the neighbouring stations agree with it.',
        }),
      )
      continue
    }
    await filling.act(who, at, (trx) =>
      answerFlag(trx, who, flag.number, {
        version: flag.version,
        cause: flag.level === 'doubt' ? 'instrument' : 'product',
        action:
          flag.level === 'doubt'
            ? 'The spare viscometer was checked with its fluid and taken out of use until then.'
            : 'Keep reading; the next version gets more polymeric emulsifier.',
        why:
          flag.level === 'doubt'
            ? 'Every station read high by the same share on that day, the cold one too.'
            : 'It moves in step with the heat and with what is seen in the watch jar.',
      }),
    )
  }
}
