import { cellLabel, parseCellLabel } from '#shared/domain/cell-label.ts'
import type { GroundCut } from '#shared/ground-codec.ts'
import type { GroundPlan } from './ground-plan.ts'

/** What a link to the Ground says: `?cut=127864000&cell=L8&list=1`. */
export interface GroundAddress {
  readonly cut: GroundCut
  readonly cell: number | undefined
  readonly list: boolean
}

export const SURFACE_CUT: GroundCut = { kind: 'surface' }

export function cutText(cut: GroundCut): string {
  return cut.kind === 'surface' ? 'surface' : String(cut.um)
}

function readCut(text: string | null): GroundCut {
  return text !== null && /^-?\d{1,12}$/.test(text) ? { kind: 'elevation', um: Number(text) } : SURFACE_CUT
}

function readCell(text: string | null, plan: GroundPlan): number | undefined {
  const place = text === null ? undefined : parseCellLabel(text)
  return place === undefined ? undefined : plan.lookup.at(place.column, place.row)
}

/** What cannot be read falls back: the working surface, no cell. */
export function readAddress(params: URLSearchParams, plan: GroundPlan): GroundAddress {
  return { cut: readCut(params.get('cut')), cell: readCell(params.get('cell'), plan), list: params.get('list') === '1' }
}

/** The parameters with a change of the address; others are kept. */
export function writeAddress(params: URLSearchParams, change: Partial<GroundAddress>, plan: GroundPlan): URLSearchParams {
  const next = new URLSearchParams(params)
  const put = (name: string, value: string | undefined): void => {
    if (value === undefined) next.delete(name)
    else next.set(name, value)
  }
  if (change.cut !== undefined) put('cut', change.cut.kind === 'surface' ? undefined : cutText(change.cut))
  if ('cell' in change) {
    const geometry = change.cell === undefined ? undefined : plan.cells[change.cell]
    put('cell', geometry === undefined ? undefined : cellLabel(geometry))
  }
  if (change.list !== undefined) put('list', change.list ? '1' : undefined)
  return next
}
