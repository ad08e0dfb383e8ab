import { useState } from 'react'
import { toast } from 'sonner'
import { z } from 'zod'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { useRecordPlacement } from '#web/data/placement/mutations.ts'
import { withoutCells } from '#web/features/ground/plan/cell-choice.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import { TaskFrame } from '#web/features/ground/tasks/task-frame.tsx'
import { isApiError } from '#web/lib/api-error.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { coveredConsequence, coveredTitle } from './covered-words.ts'
import { CoveredQuestion } from './covered-question.tsx'
import { PlacementFields } from './placement-fields.tsx'
import { usePlacementDraft } from './use-placement-draft.ts'

const coveredDetailsSchema = z.object({ cells: z.array(z.number()) })

/** Cells that the server found to be covered too early; null where its answer is about something else. */
function coveredCells(error: Error): readonly number[] | null {
  if (!isApiError(error) || error.code !== 'covered_too_early') return null
  const details = coveredDetailsSchema.safeParse(error.details)
  return details.success ? details.data.cells : null
}

/** Recording fill placed on chosen cells. What is typed stays until it is saved or cancelled. */
export function PlaceFill({ surface, lift }: { surface: GroundSheet; lift: number | null }) {
  const { site, units } = useSite()
  const { plan, chosen, choose, end } = useGroundView()
  const form = usePlacementDraft(surface, lift)
  const { input, uncovered } = form.reading
  const record = useRecordPlacement(site.id, { saysOwnErrors: true })
  const [covered, setCovered] = useState<readonly number[]>([])

  const save = (coverReason: string | null): void => {
    if (input === null) return
    record.mutate(
      { ...input, id: form.id, coverReason },
      {
        onSuccess: ({ number, volume }) => {
          toast(`${number ?? 'Placement'} saved`, { description: `${countOf(input.cells.length, 'cell')}, ${units.volume(volume)} at lift ${input.lift}` })
          end()
        },
        onError: (error) => setCovered(coveredCells(error) ?? []),
      },
    )
  }
  const handleSave = (): void => {
    if (uncovered.length > 0) setCovered(uncovered)
    else save(null)
  }
  const handleLeaveOut = (): void => {
    choose(withoutCells(chosen, covered))
    setCovered([])
    record.reset()
  }
  const { isPending, isPaused } = record
  const error = record.error !== null && coveredCells(record.error) === null ? record.error : null
  return (
    <>
      <TaskFrame title="Place fill" act={{ error, isPending, isPaused }} saveLabel="Save placement" canSave={input !== null} onSave={handleSave}>
        <PlacementFields {...form} />
      </TaskFrame>
      {covered.length > 0 && (
        <CoveredQuestion
          title={coveredTitle(covered)}
          consequence={coveredConsequence(plan, surface, covered)}
          saving={isPending}
          onLeaveOut={handleLeaveOut}
          onPlaceAnyway={save}
          onClose={() => setCovered([])}
        />
      )}
    </>
  )
}
