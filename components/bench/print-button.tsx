'use client'

import { Button } from '@/components/ui/button'

export function PrintButton() {
  return (
    <Button kind="primary" density="bench" onClick={() => window.print()}>
      Print
    </Button>
  )
}
