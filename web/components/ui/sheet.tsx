import { useId, useState, type ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

type SheetProps = {
  /** Names the region: "What may be covered". */
  label: string
  /** The line that stays in sight when the sheet is drawn down over the map. */
  peek: ReactNode
  children: ReactNode
  startOpen?: boolean
  className?: string
}

/** The panel at the right; narrower than a tablet it lies over the map from below and is drawn up by its first line. */
export function Sheet({ label, peek, children, startOpen = false, className }: SheetProps) {
  const [open, setOpen] = useState(startOpen)
  const bodyId = useId()
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
        onClick={() => setOpen(!open)}
        className="flex min-h-12 w-full shrink-0 items-center gap-3 px-[22px] text-left font-semibold -outline-offset-3 lg:hidden"
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
