import { useState } from 'react'
import { parseCellRange } from '#shared/domain/cell-range.ts'
import { CellsField } from '#web/components/ui/text-fields.tsx'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf } from '#web/features/ground/plan/ground-words.ts'

export type CellsRead = { readonly ok: true; readonly cells: readonly number[] } | { readonly ok: false; readonly reason: string }

/** Cells of the site that a typed range names; places outside the boundary are passed over. */
export function readCells(text: string, plan: GroundPlan): CellsRead {
  if (text.trim() === '') return { ok: true, cells: [] }
  const parsed = parseCellRange(text, plan.site.grid)
  if (!parsed.ok) return parsed
  const cells = parsed.cells.flatMap(({ column, row }) => plan.lookup.at(column, row) ?? [])
  return cells.length === 0 ? { ok: false, reason: 'No cell of the site lies there.' } : { ok: true, cells: [...cells].sort((a, b) => a - b) }
}

type CellsChoiceProps = {
  /** what is wrong with the chosen cells */
  error?: string | undefined
  warning?: string | undefined
  /** what they come to besides their number: "618 cy" */
  comesTo?: string | undefined
}

/** The cells of a task: drawn on the map, or typed as a range; both say the same. */
export function CellsChoice({ error, warning, comesTo }: CellsChoiceProps) {
  const { plan, chosen, choose } = useGroundView()
  const [typed, setTyped] = useState<{ text: string; cells: readonly number[]; problem: string | undefined } | null>(null)
  const own = typed !== null && (typed.problem !== undefined || typed.cells === chosen)
  const handleChange = (text: string): void => {
    const read = readCells(text, plan)
    if (!read.ok) return setTyped({ text, cells: chosen, problem: read.reason })
    setTyped({ text, cells: read.cells, problem: undefined })
    choose(read.cells)
  }
  const count = countOf(chosen.length, 'cell')
  return (
    <CellsField
      label="Cells"
      value={own ? typed.text : plan.range(chosen)}
      placeholder="G11:I13, K12"
      comesTo={comesTo === undefined ? count : `${count}, ${comesTo}`}
      hint="Drag over the map, click a cell, or type a range"
      error={typed !== null && own ? (typed.problem ?? error) : error}
      warning={warning}
      onChange={(event) => handleChange(event.target.value)}
      onBlur={() => setTyped((before) => (before?.problem === undefined ? null : before))}
    />
  )
}
