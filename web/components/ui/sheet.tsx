import { useId, useRef, useState, type MouseEvent, type PointerEvent, type ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

type SheetProps = {
  /** Names the region: "What may be covered". */
  label: string
  /** The line that stays in sight when the sheet is drawn down over the map. */
  peek: ReactNode
  children: ReactNode
  startOpen?: boolean
  /** Given, the page draws the sheet up and down. */
  open?: boolean
  onOpenChange?: (open: boolean) => void
  className?: string
}

/** A pull on the sheet's first line that is longer than this draws it, CSS pixels. */
const PULL = 24

/** The panel at the right; narrower than a tablet it lies over the map from below and is drawn up by its first line. */
export function Sheet({ label, peek, children, startOpen = false, open: given, onOpenChange, className }: SheetProps) {
  const [own, setOwn] = useState(startOpen)
  const open = given ?? own
  const pulledFrom = useRef<number | null>(null)
  const bodyId = useId()
  const setOpen = (next: boolean): void => {
    setOwn(next)
    onOpenChange?.(next)
  }
  const handlePull = (event: PointerEvent): void => {
    const from = pulledFrom.current
    if (from === null || Math.abs(event.clientY - from) <= PULL) return
    setOpen(event.clientY < from)
    pulledFrom.current = null
  }
  const handleClick = (event: MouseEvent): void => {
    // the click that ends a pull is not a tap; a key press has no pointer down before it
    if (event.detail > 0 && pulledFrom.current === null) return
    setOpen(!open)
  }
  return (
    <aside
      aria-label={label}
      className={classNames(
        'z-20 flex flex-col bg-raised text-ink',
        'max-lg:absolute max-lg:inset-x-0 max-lg:bottom-0 max-lg:max-h-[78%] max-lg:border-t-2 max-lg:border-ink',
        'lg:w-96 lg:shrink-0 lg:overflow-y-auto lg:border-l lg:border-rule-2',
        className,
      )}
    >
      <button
        type="button"
        aria-expanded={open}
        aria-controls={bodyId}
        onClick={handleClick}
        onPointerDown={(event) => {
          pulledFrom.current = event.clientY
          event.currentTarget.setPointerCapture(event.pointerId)
        }}
        onPointerUp={handlePull}
        className="flex min-h-12 touch-none w-full shrink-0 items-center gap-3 px-[22px] text-left font-semibold -outline-offset-3 lg:hidden"
      >
        <span className="min-w-0 flex-1">{peek}</span>
        <span className="link-ink text-small">{open ? 'Draw down' : 'Draw up'}</span>
      </button>
      <div id={bodyId} className={classNames('min-h-0 flex-col max-lg:overflow-y-auto max-lg:border-t max-lg:border-rule lg:flex lg:flex-1', open ? 'flex' : 'max-lg:hidden')}>
        {children}
      </div>
    </aside>
  )
}

/** A ruled part of a panel with its heading. */
export function PanelSection({ title, aside, children, last = false }: { title?: ReactNode; aside?: ReactNode; children: ReactNode; last?: boolean }) {
  return (
    <section className={classNames('px-[22px] py-[18px]', last ? 'flex-1' : 'border-b border-rule')}>
      {title !== undefined && (
        <h2 className="m-0 mb-[2px] flex items-baseline gap-2 text-head font-bold">
          <span className="min-w-0 flex-1">{title}</span>
          {aside !== undefined && <span className="text-small font-medium text-ink-2">{aside}</span>}
        </h2>
      )}
      {children}
    </section>
  )
}
