import { cellLabel } from '#shared/domain/cell-label.ts'
import type { Purpose, TestDetail } from '#shared/schemas/field-test.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import type { CellGeometry } from '#shared/domain/site-geometry.ts'
import { moistureHabits, type Habits, type TestForm } from './test-form.ts'

/** What the address the sheet was opened at says. */
export interface Opening {
  readonly stake: string | null
  readonly cell: string | null
  readonly follows: { readonly testId: string; readonly kind: 'retest' | 'rerun' } | null
  readonly point: { readonly easting: string; readonly northing: string } | null
  readonly lift: string | null
}

/** @param search `?stake=&cell=&follows=&kind=&e=&n=&lift=` */
export function readOpening(search: URLSearchParams): Opening {
  const testId = search.get('follows')
  const [easting, northing] = [search.get('e'), search.get('n')]
  return {
    stake: search.get('stake'),
    cell: search.get('cell'),
    follows: testId === null ? null : { testId, kind: search.get('kind') === 'rerun' ? 'rerun' : 'retest' },
    point: easting === null || northing === null ? null : { easting, northing },
    lift: search.get('lift'),
  }
}

interface Known {
  readonly stakes: readonly Stake[]
  readonly cells: readonly CellGeometry[]
  readonly followed: TestDetail | null
  readonly purposes: readonly Purpose[]
  readonly habits: Habits
}

/** A cell in an address: its label, such as N4, or its index. */
function cellText(text: string, cells: readonly CellGeometry[]): string {
  const geometry = /^\d+$/.test(text) ? cells[Number(text)] : undefined
  return geometry === undefined ? text : cellLabel(geometry)
}

/** The empty sheet with what the address already says filled in. */
export function openForm(blank: TestForm, opening: Opening, { stakes, cells, followed, purposes, habits }: Known): TestForm {
  const stake = stakes.find((each) => each.id === opening.stake || each.label === opening.stake)
  const only = purposes.length === 1 ? purposes[0] : undefined
  const form: TestForm = {
    ...blank,
    lift: opening.lift ?? '',
    purpose: only ?? '',
    ...(opening.cell === null ? {} : { placeBy: 'cell', cell: cellText(opening.cell, cells) }),
    ...(opening.point === null ? {} : { placeBy: 'point', ...opening.point }),
  }
  if (stake !== undefined) return { ...form, placeBy: 'stake', stakeId: stake.id, lift: String(stake.lift), purpose: purposes.includes('required') ? 'required' : form.purpose }
  if (followed === null) return form
  return {
    ...form,
    ...(opening.point === null && opening.cell === null ? { placeBy: 'point', easting: String(followed.easting), northing: String(followed.northing) } : {}),
    lift: String(followed.lift),
    purpose: purposes.includes(followed.purpose) ? followed.purpose : form.purpose,
    curveId: followed.curveId,
    method: followed.method,
    moisture: { ...form.moisture, ...moistureHabits(followed.method, habits) },
  }
}
