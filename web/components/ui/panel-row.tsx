import type { ReactNode } from 'react'

type PanelRowProps = {
  /** A state's swatch, a stake's flag, a test's mark. */
  mark: ReactNode
  title: ReactNode
  detail?: ReactNode
  /** A link, a button or a figure. */
  action?: ReactNode
}

/** Rows of a panel: mark, what, where, and what to do about it. */
export function PanelRows({ children, label }: { children: ReactNode; label?: string }) {
  return (
    <ul aria-label={label} className="m-0 mt-[10px] list-none p-0">
      {children}
    </ul>
  )
}

export function PanelRow({ mark, title, detail, action }: PanelRowProps) {
  return (
    <li className="grid grid-cols-[auto_1fr_auto] items-start gap-[10px] border-t border-rule py-[9px] leading-[1.3]">
      <span className="mt-px min-w-[22px]">{mark}</span>
      <span className="min-w-0">
        <b className="block font-semibold">{title}</b>
        {detail !== undefined && <span className="block text-small text-ink-2">{detail}</span>}
      </span>
      {action !== undefined && <span className="text-[13px] whitespace-nowrap [&_a]:link-ink [&_button]:link-ink">{action}</span>}
    </li>
  )
}
