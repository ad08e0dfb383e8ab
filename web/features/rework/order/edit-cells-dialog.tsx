import { useState } from 'react'
import { parseCellRange } from '#shared/domain/cell-range.ts'
import { cellLabel } from '#shared/domain/cell-label.ts'
import type { CellLookup } from '#shared/domain/cells.ts'
import type { GridDefinition } from '#shared/domain/site-geometry.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { CellsField, TextArea } from '#web/components/ui/text-fields.tsx'
import { useEditOrder } from '#web/data/order/mutations.ts'
import { cellRange } from '#web/lib/cell-range.ts'
import { useSite } from '#web/lib/site-context.tsx'

type TypedCells = { readonly ok: true; readonly cells: readonly number[] } | { readonly ok: false; readonly reason: string }

function readCells(text: string, grid: GridDefinition, lookup: CellLookup): TypedCells {
  const range = parseCellRange(text, grid)
  if (!range.ok) return range
  const cells: number[] = []
  for (const place of range.cells) {
    const cell = lookup.at(place.column, place.row)
    if (cell === undefined) return { ok: false, reason: `${cellLabel(place)} lies outside the site.` }
    cells.push(cell)
  }
  return { ok: true, cells }
}

/** The lead changes which cells the order holds, with a reason; what may not leave yet is said by the server. */
export function EditCellsDialog({ order, onClose }: { order: Order; onClose: () => void }) {
  const { site, lookup } = useSite()
  const [text, setText] = useState(() => cellRange(lookup, order.cells))
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const edit = useEditOrder(site.id, { saysOwnErrors: true })
  const typed = readCells(text, site.grid, lookup)
  const reasonMissing = reason.trim().length < 3
  const save = () => {
    setAsked(true)
    if (typed.ok && !reasonMissing) edit.mutate({ orderId: order.id, cells: [...typed.cells], reason: reason.trim() }, { onSuccess: onClose })
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Cells of ${order.number}`}
      description="A cell leaves only where a pass sampled after the failure lies in it, or between it and the failure."
      actions={
        <>
          <Button kind="primary" busyLabel={edit.isPending && 'Saving'} onClick={save}>
            Save the cells
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3">
        <CellsField label="Cells" value={text} error={typed.ok ? undefined : typed.reason} comesTo={typed.ok ? `${typed.cells.length} cells` : undefined} onChange={(event) => setText(event.target.value)} />
        <TextArea label="Reason" rows={2} maxLength={2_000} value={reason} error={asked && reasonMissing ? 'Say why, in a few words' : undefined} onChange={(event) => setReason(event.target.value)} />
        {edit.error !== null && <Banner tone="bad" title={edit.error.message} />}
      </div>
    </Dialog>
  )
}
