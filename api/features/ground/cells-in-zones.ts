import { invalid } from '#api/errors.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'

/** The chosen cells, each once; refused when one is not a cell of this site or lies in no zone. */
export function cellsInZones(plan: SitePlan, chosen: readonly number[], zoneId?: string): number[] {
  const cells = [...new Set(chosen)].sort((a, b) => a - b)
  const strange = cells.filter((cell) => {
    const zone = plan.zoneOf(cell)
    return zone === undefined || (zoneId !== undefined && zone.id !== zoneId)
  })
  if (strange.length === 0) return cells
  const names = strange.slice(0, 6).map((cell) => (plan.cells[cell] ? plan.label(cell) : 'a cell that is not on this site'))
  throw invalid(`These cells do not belong here: ${names.join(', ')}. Leave them out; what you entered was kept.`, { cells: strange })
}
