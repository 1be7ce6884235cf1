'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { defaultColumns, type Column } from '@/lib/list/schema'
import { capital } from '@/lib/study/rules/words'

type Props<Line> = {
  columns: readonly Column<Line>[]
  chosen: readonly string[]
  isDrawn: boolean
  onClose: () => void
  onChoose: (columns: string[]) => void
}

/** Which columns a list shows and its files hold. */
export function ColumnsDialog<Line>({ columns, chosen, isDrawn, onClose, onChoose }: Props<Line>) {
  const [picked, setPicked] = useState<readonly string[]>(chosen)
  const keys = columns.map((column) => column.key).filter((key) => picked.includes(key))
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={isDrawn ? 'Columns of the file' : 'Columns of this list'}
      sentence={
        isDrawn
          ? 'The list is drawn as it is; a file has the columns ticked here.'
          : 'They stand in the address, so that a link shows the same; a file has them too.'
      }
      width={520}
      acts={
        <>
          <Button onClick={() => onChoose(defaultColumns(columns))}>The usual ones</Button>
          <Button
            kind="primary"
            why={keys.length === 0 ? 'Tick at least one column.' : undefined}
            onClick={() => onChoose(keys)}
          >
            {isDrawn ? 'Take these' : 'Show these'}
          </Button>
        </>
      }
    >
      <fieldset className="grid gap-x-6 sm:grid-cols-2">
        <legend className="sr-only">Columns</legend>
        {columns.map(({ key, title }) => (
          <Checkbox
            key={key}
            label={capital(title)}
            checked={picked.includes(key)}
            onSet={(isOn) => setPicked(isOn ? [...picked, key] : picked.filter((one) => one !== key))}
          />
        ))}
      </fieldset>
    </Dialog>
  )
}
