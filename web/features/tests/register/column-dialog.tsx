import { useState } from 'react'
import { REGISTER_KEYS, type RegisterKey } from '#shared/schemas/test-register.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { USUAL_COLUMNS } from './register-address.ts'
import { REGISTER_COLUMNS } from './register-columns.tsx'

type ColumnDialogProps = { columns: readonly RegisterKey[]; onChange: (columns: readonly RegisterKey[]) => void; onClose: () => void }

/** A key moved by one place among the shown; the number keeps the first. */
export function moved(columns: readonly RegisterKey[], key: RegisterKey, by: -1 | 1): readonly RegisterKey[] {
  const from = columns.indexOf(key)
  const to = from + by
  if (from < 1 || to < 1 || to >= columns.length) return columns
  const next = columns.filter((each) => each !== key)
  next.splice(to, 0, key)
  return next
}

/** Which columns the register shows and in which order. The table behind follows at once. */
export function ColumnDialog({ columns, onChange, onClose }: ColumnDialogProps) {
  const [said, setSaid] = useState('')
  const hidden = REGISTER_KEYS.filter((key) => !columns.includes(key))
  const move = (key: RegisterKey, by: -1 | 1): void => {
    const next = moved(columns, key, by)
    onChange(next)
    setSaid(`${REGISTER_COLUMNS[key].name}, ${next.indexOf(key) + 1} of ${next.length}`)
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Columns"
      actions={
        <>
          <DialogClose>
            <Button kind="primary" size="touch">
              Done
            </Button>
          </DialogClose>
          <Button size="touch" onClick={() => onChange(USUAL_COLUMNS)}>
            The usual ones
          </Button>
        </>
      }
    >
      <ul aria-label="Columns, from left to right" className="m-0 list-none border-t border-ink p-0">
        {[...columns, ...hidden].map((key) => (
          <ColumnLine
            key={key}
            name={REGISTER_COLUMNS[key].name}
            fixed={key === 'number'}
            place={columns.indexOf(key)}
            last={columns.length - 1}
            onShow={(shown) => onChange(shown ? [...columns, key] : columns.filter((each) => each !== key))}
            onMove={(by) => move(key, by)}
          />
        ))}
      </ul>
      <p aria-live="polite" className="sr-only">
        {said}
      </p>
    </Dialog>
  )
}

type ColumnLineProps = { name: string; fixed: boolean; place: number; last: number; onShow: (shown: boolean) => void; onMove: (by: -1 | 1) => void }

/** The buttons at the ends stay where they are, so that the focus does too. */
function ColumnLine({ name, fixed, place, last, onShow, onMove }: ColumnLineProps) {
  const shown = place >= 0
  return (
    <li className="flex min-h-10 items-center gap-1 border-b border-rule pointer-coarse:min-h-12">
      <label className="flex min-h-10 min-w-0 flex-1 items-center gap-[10px] pointer-coarse:min-h-12">
        <input type="checkbox" className="size-[18px] accent-ink" checked={shown} disabled={fixed} onChange={(event) => onShow(event.target.checked)} />
        <span className={shown ? 'font-medium' : 'text-ink-2'}>{name}</span>
      </label>
      {shown && !fixed && (
        <>
          <MoveButton label={`Move ${name} left`} path="M5 11V1M1 5l4-4 4 4" off={place <= 1} onMove={() => onMove(-1)} />
          <MoveButton label={`Move ${name} right`} path="M5 1v10M1 7l4 4 4-4" off={place >= last} onMove={() => onMove(1)} />
        </>
      )}
    </li>
  )
}

function MoveButton({ label, path, off, onMove }: { label: string; path: string; off: boolean; onMove: () => void }) {
  return (
    <button type="button" aria-label={label} aria-disabled={off} onClick={onMove} className="grid size-9 place-items-center -outline-offset-3 hover:bg-film aria-disabled:opacity-30 pointer-coarse:size-12">
      <svg aria-hidden width="10" height="12" viewBox="0 0 10 12">
        <path d={path} fill="none" stroke="currentColor" strokeWidth="1.6" />
      </svg>
    </button>
  )
}
