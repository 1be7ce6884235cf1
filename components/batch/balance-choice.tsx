'use client'

import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { instrumentDoubt } from '@/lib/batch/rules/weighing'

export type Balance = { id: string; name: string }

type Props = { batch: BatchPage; balance: Balance; onBalance: (balance: Balance) => void }

/** The balance of this sheet with what is doubtful about it; typed by name in a lab that lists none. */
export function BalanceChoice({ batch, balance, onBalance }: Props) {
  const balances = batch.instruments.filter((instrument) => instrument.kind === 'balance')
  if (!balances.length) {
    return <Field label="Balance" value={balance.name} onText={(name) => onBalance({ id: '', name })} />
  }
  const chosen = balances.find((one) => one.id === balance.id)
  const doubt = chosen ? instrumentDoubt(chosen, batch.today) : null
  return (
    <div className="min-w-[240px]">
      <Select
        label="Balance"
        empty="Choose"
        value={chosen?.id ?? ''}
        options={balances.map(({ id, code, name }) => ({ value: id, label: `${code}, ${name}` }))}
        onPick={(id) => onBalance({ id, name: '' })}
        hint={
          doubt === null && chosen?.calibratedAt
            ? `Checked ${dayAndHour(chosen.calibratedAt)}`
            : chosen
              ? undefined
              : 'Its last check is shown here.'
        }
        {...(doubt ? { error: doubt } : {})}
      />
    </div>
  )
}

const form = new Intl.DateTimeFormat('en-GB', {
  ...{ day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' },
})
export const dayAndHour = (instant: string) => form.format(new Date(instant)).replace('Sept', 'Sep')
