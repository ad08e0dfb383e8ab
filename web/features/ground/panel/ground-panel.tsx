import type { GroundSheet } from '#shared/ground-codec.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Board } from '#shared/schemas/ground.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { PanelSection, Sheet } from '#web/components/ui/sheet.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { CellSection } from '#web/features/ground/cell/cell-section.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { TaskPanel } from '#web/features/ground/tasks/task-panel.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { ChosenSection } from './chosen-section.tsx'
import { OperatorPanel } from './operator-panel.tsx'
import { OwnerPanel } from './owner-panel.tsx'
import { peekWords } from './peek-words.ts'
import { QcPanel } from './qc-panel.tsx'
import { SuperintendentPanel } from './superintendent-panel.tsx'
import { useBoard, useOrders } from './use-panel-data.ts'

const LABELS: Readonly<Record<Role, string>> = {
  superintendent: 'What may receive the next lift',
  'qc-lead': 'What is owed',
  technician: 'What is owed',
  'owner-rep': 'How far the fill has come',
  operator: 'My rework',
}

function RolePanel({ board }: { board: Board }) {
  const { role } = useSite()
  switch (role) {
    case 'superintendent':
      return <SuperintendentPanel board={board} />
    case 'qc-lead':
    case 'technician':
      return <QcPanel board={board} />
    case 'owner-rep':
      return <OwnerPanel board={board} />
    case 'operator':
      return <OperatorPanel board={board} />
  }
}

function BoardPart() {
  const board = useBoard()
  if (board.data !== undefined) return <RolePanel board={board.data} />
  if (board.error === null) {
    return (
      <PanelSection>
        <Skeleton label="The board is on its way" lines={[46, 62, 92, 70, 92, 70]} />
      </PanelSection>
    )
  }
  return (
    <Banner tone="bad" title="The board cannot be read." className="m-[22px]" action={<button type="button" onClick={() => void board.refetch()}>Try again</button>}>
      {board.error.message}
    </Banner>
  )
}

/** The panel at the right: the reader's question answered, or the task in hand; and the selected cell. */
export function GroundPanel({ surface }: { surface: GroundSheet | undefined }) {
  const { role, units } = useSite()
  const { task, chosen, address, panelOpen, openPanel } = useGroundView()
  const board = useBoard().data
  const orders = useOrders()
  return (
    <Sheet
      label={LABELS[role]}
      peek={peekWords({ role, board, orders, task, chosen: chosen.length, units })}
      open={panelOpen}
      onOpenChange={openPanel}
      className="lg:col-start-3 lg:row-span-2 lg:row-start-1 lg:min-h-0"
    >
      {task !== null ? (
        <TaskPanel key={task.kind} task={task} surface={surface} />
      ) : (
        <>
          <div className="min-h-0 lg:flex-1 lg:overflow-y-auto">
            <ChosenSection surface={surface} />
            <BoardPart />
          </div>
          {address.cell !== undefined && (
            // the cell stays in sight under the board; narrow, it comes first, since a tap on it opens the panel
            <div className="border-rule-2 max-lg:order-first max-lg:border-b lg:max-h-[52%] lg:shrink-0 lg:overflow-y-auto lg:border-t-2 lg:border-t-ink">
              <CellSection cell={address.cell} />
            </div>
          )}
        </>
      )}
    </Sheet>
  )
}
