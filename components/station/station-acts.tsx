'use client'

import dynamic from 'next/dynamic'
import { useState } from 'react'
import { Button } from '@/components/ui/button'

const CycleRemark = dynamic(() => import('@/components/cycle/cycle-remark').then((m) => m.CycleRemark))
export const CycleAlarm = dynamic(() => import('@/components/cycle/cycle-remark').then((m) => m.CycleAlarm))
const TemperatureDialog = dynamic(() => import('./temperature-dialog').then((m) => m.TemperatureDialog))

type Props = { station: { id: string; name: string; kind: string }; mayLogTemperature: boolean }

/** What is done at a station itself while one stands there: its temperature, and the freezer's cycles. */
export function StationActs({ station, mayLogTemperature }: Props) {
  const [isOpen, setOpen] = useState(false)
  return (
    <div data-density="bench" className="flex flex-col gap-3 pb-3">
      {station.kind === 'freeze-thaw' ? <CycleRemark stationId={station.id} /> : null}
      {station.kind === 'temperature' && mayLogTemperature ? (
        <div>
          <Button density="bench" onClick={() => setOpen(true)}>
            Log its temperature
          </Button>
        </div>
      ) : null}
      {isOpen ? (
        <TemperatureDialog
          station={station}
          density="bench"
          onClose={() => setOpen(false)}
          onDone={() => undefined}
        />
      ) : null}
    </div>
  )
}
