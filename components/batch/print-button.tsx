'use client'

import { Button } from '@/components/ui/button'

export function PrintButton() {
  return (
    <Button kind="primary" onClick={() => window.print()}>
      Print it
    </Button>
  )
}
