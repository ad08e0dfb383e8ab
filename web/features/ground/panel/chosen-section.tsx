import { groundStateOf } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { Button } from '#web/components/ui/button.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { TASK_TITLES } from '#web/features/ground/plan/ground-task.ts'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { chosenTasks } from './chosen-tasks.ts'

/** Cells drawn out on the map before anything is decided: what may be done with them. */
export function ChosenSection({ surface }: { surface: GroundSheet | undefined }) {
  const { role } = useSite()
  const { plan, chosen, choose, start } = useGroundView()
  if (chosen.length === 0) return null
  const standings = chosen.map((cell) => ({ lift: surface?.lift[cell] ?? 0, state: groundStateOf(surface?.state[cell] ?? 0) }))
  const tasks = chosenTasks(standings, role)
  return (
    <PanelSection title={`${countOf(chosen.length, 'cell')} chosen`} aside={plan.range(chosen)}>
      <div className="mt-2 flex flex-wrap gap-2">
        {tasks.map((task) => (
          <Button key={task.kind} className="pointer-coarse:min-h-12" onClick={() => start(task, chosen)}>
            {task.kind === 'release' && role === 'superintendent' ? 'Ask for release' : TASK_TITLES[task.kind]}
          </Button>
        ))}
        <Button kind="quiet" className="pointer-coarse:min-h-12" onClick={() => choose([])}>
          Let go
        </Button>
      </div>
    </PanelSection>
  )
}
