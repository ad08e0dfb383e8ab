import type { ReactNode } from 'react'
import { PanelRow } from '#web/components/ui/panel-row.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'

/** Draws out cells on the sheet. The words say which, for those who cannot see it. */
export function ShowButton({ cells, of, children = 'Show' }: { cells: readonly number[]; of: string; children?: ReactNode }) {
  const { shown, show } = useGroundView()
  return (
    <button type="button" aria-pressed={shown === cells} aria-label={`Show ${of}`} onClick={() => show(cells)} className="pointer-coarse:-mt-[14px] pointer-coarse:min-h-12 pointer-coarse:min-w-12 pointer-coarse:text-right">
      {children}
    </button>
  )
}

type GroupRowProps = {
  mark: ReactNode
  title: ReactNode
  detail: ReactNode
  action?: ReactNode
  /** Links and buttons beneath the row's words. */
  acts?: ReactNode
}

/** A row about cells: what, where, and what can be done about it. */
export function GroupRow({ mark, title, detail, action, acts }: GroupRowProps) {
  const words = (
    <>
      {detail}
      {acts !== undefined && acts !== null && (
        <span className="mt-1 flex flex-wrap gap-x-4 text-[13px] [&_a]:link-ink [&_a]:pointer-coarse:min-h-12 [&_button]:link-ink [&_button]:pointer-coarse:min-h-12">{acts}</span>
      )}
    </>
  )
  return <PanelRow mark={mark} title={title} detail={words} action={action} />
}
