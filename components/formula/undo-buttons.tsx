'use client'

import { Button } from '@/components/ui/button'
import type { DraftHandle } from './use-draft'

/** One step back and forth, over cells, pasted blocks and moved rows alike. */
export function UndoButtons({ undo }: { undo: DraftHandle['undo'] }) {
  return (
    <span className="flex gap-2">
      <Button
        title="Ctrl Z"
        aria-disabled={undo.canUndo ? undefined : true}
        onClick={undo.canUndo ? undo.takeBack : undefined}
      >
        Undo
      </Button>
      <Button
        title="Ctrl Shift Z"
        aria-disabled={undo.canRedo ? undefined : true}
        onClick={undo.canRedo ? undo.doAgain : undefined}
      >
        Redo
      </Button>
    </span>
  )
}
