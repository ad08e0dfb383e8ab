import { Link } from 'react-router-dom'
import type { Column } from '#shared/schemas/ground.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { newTestLink } from '#web/features/ground/plan/ground-links.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { cellActs } from './cell-acts.ts'

const TOUCH = 'pointer-coarse:min-h-12'

export function CellActions({ column }: { column: Column }) {
  const { site, role, label } = useSite()
  const { start } = useGroundView()
  const acts = cellActs(column, role)
  const order = column.rows.find((row) => row.orderId !== null)?.orderId ?? null
  if (acts.length === 0 && order === null) return null
  return (
    <div className="mt-4 flex flex-wrap gap-2">
      {order !== null && (
        <Link to={paths.reworkOrder(site.id, order)} className={buttonClasses('plain', 'regular', TOUCH)}>
          Open the rework order
        </Link>
      )}
      {acts.map((act) =>
        'task' in act ? (
          <Button key={act.label} className={TOUCH} onClick={() => start(act.task, [column.cell])}>
            {act.label}
          </Button>
        ) : (
          <Link key={act.label} to={newTestLink(site.id, { cell: label(column.cell), ...act.record })} className={buttonClasses('plain', 'regular', TOUCH)}>
            {act.label}
          </Link>
        ),
      )}
    </div>
  )
}
