import { cellLabel, parseCellLabel } from '#shared/domain/cell-label.ts'
import { gridToSite, locate } from '#shared/domain/grid.ts'
import { cellLayers } from '#shared/domain/lift-schedule.ts'
import type { Layer, SitePoint } from '#shared/domain/site-geometry.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import type { Zone } from '#shared/schemas/site.ts'
import type { SiteContextValue } from '#web/lib/site-context.tsx'
import { reading } from './read-sheet.ts'
import type { TestForm } from './test-form.ts'

export interface Place {
  readonly at: SitePoint
  readonly cell: number
  readonly zone: Zone
  readonly stake: Stake | null
  /** planned lifts of the cell, lowest first */
  readonly layers: readonly Layer[]
}

export type Placed = { readonly ok: true; readonly place: Place } | { readonly ok: false; readonly field: 'stakeId' | 'cell' | 'easting' | 'northing'; readonly message: string; readonly missing: boolean }

type Spot = Pick<TestForm, 'placeBy' | 'stakeId' | 'cell' | 'easting' | 'northing'>
type Plan = Pick<SiteContextValue, 'site' | 'cells' | 'lookup' | 'zoneOfCell'>

const refuse = (field: Extract<Placed, { ok: false }>['field'], message: string, missing = false): Placed => ({ ok: false, field, message, missing })

/** Where the test was taken: at a stake, in the middle of a cell, or at coordinates. */
export function placeTest(spot: Spot, plan: Plan, stakes: readonly Stake[]): Placed {
  switch (spot.placeBy) {
    case 'stake': {
      const stake = stakes.find((each) => each.id === spot.stakeId)
      if (stake === undefined) return refuse('stakeId', 'Choose a stake.', true)
      return inCell(plan, stake.cell, { easting: stake.easting, northing: stake.northing }, stake, 'stakeId')
    }
    case 'cell':
      return atCell(spot.cell, plan)
    case 'point':
      return atPoint(spot, plan)
  }
}

function atCell(text: string, plan: Plan): Placed {
  if (text.trim() === '') return refuse('cell', 'Name the cell, such as N4.', true)
  const address = parseCellLabel(text)
  if (address === undefined) return refuse('cell', 'Write a cell as its letters and number, such as N4.')
  const cell = plan.lookup.at(address.column, address.row)
  const geometry = cell === undefined ? undefined : plan.cells[cell]
  if (cell === undefined || geometry === undefined) return refuse('cell', `Cell ${cellLabel(address)} is not on this site.`)
  const { easting, northing } = gridToSite(plan.site.grid, geometry.centroid)
  return inCell(plan, cell, { easting: toThousandths(easting), northing: toThousandths(northing) }, null, 'cell')
}

function atPoint(spot: Spot, plan: Plan): Placed {
  const at = { easting: reading(spot.easting), northing: reading(spot.northing) }
  for (const field of ['easting', 'northing'] as const) {
    if (spot[field].trim() === '') return refuse(field, `Enter the ${field}.`, true)
    if (!Number.isFinite(at[field])) return refuse(field, 'Write it as a plain number, such as 12.5.')
  }
  const address = locate(plan.site.grid, at)
  const cell = address && plan.lookup.at(address.column, address.row)
  if (cell === undefined) return refuse('easting', 'That place is not on this site. Check easting and northing.')
  return inCell(plan, cell, at, null, 'easting')
}

function inCell(plan: Plan, cell: number, at: SitePoint, stake: Stake | null, field: Extract<Placed, { ok: false }>['field']): Placed {
  const geometry = plan.cells[cell]
  const zone = plan.zoneOfCell(cell)
  if (geometry === undefined || zone === undefined) return refuse(field, 'No fill is planned there: the place lies outside every zone.')
  const layers = cellLayers(zone.liftPlan, geometry.baseUm, geometry.designUm)
  if (layers.length === 0) return refuse(field, `No fill is planned in cell ${cellLabel(geometry)}.`)
  return { ok: true, place: { at, cell, zone, stake, layers } }
}

const toThousandths = (value: number): number => Math.round(value * 1000) / 1000
