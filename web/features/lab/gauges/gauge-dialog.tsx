import type { ReactNode } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { issuesOf } from '#web/features/lab/lab-words.ts'

type GaugeDialogProps = {
  title: string
  description?: ReactNode
  act: string
  danger?: boolean
  busy: boolean
  error: Error | null
  onSave: () => void
  onClose: () => void
  wide?: boolean
  children: ReactNode
}

/** The frame of every dialog of the register: its act, the way out, and what the server would not take. */
export function GaugeDialog({ title, description, act, danger = false, busy, error, onSave, onClose, wide = false, children }: GaugeDialogProps) {
  return (
    <Dialog
      open
      wide={wide}
      onOpenChange={(open) => !open && onClose()}
      title={title}
      description={description}
      actions={
        <>
          <Button kind={danger ? 'danger' : 'primary'} className="pointer-coarse:min-h-12" busyLabel={busy && 'Saving'} onClick={onSave}>
            {act}
          </Button>
          <DialogClose>
            <Button kind="quiet" className="pointer-coarse:min-h-12">
              Cancel
            </Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3">
        {children}
        {issuesOf(error).map((message) => (
          <Banner key={message} tone="bad" title={message} />
        ))}
      </div>
    </Dialog>
  )
}
