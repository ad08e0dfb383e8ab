import { createContext, useContext, useMemo, type ReactNode } from 'react'
import { cellLabel } from '#shared/domain/cell-label.ts'
import { makeCellLookup, type CellLookup } from '#shared/domain/cells.ts'
import { findCoordinateSystem, type CoordinateSystem } from '#shared/domain/coordinate-systems.ts'
import type { CellGeometry } from '#shared/domain/site-geometry.ts'
import { can, type Verb } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Site, SiteCells, Zone } from '#shared/schemas/site.ts'
import { makeUnits, type Units } from './units.ts'

/** The site that is open, for every page beneath /sites/:siteId. */
export interface SiteContextValue {
  readonly site: Site
  readonly system: CoordinateSystem
  /** static geometry by columns, indexed by cell */
  readonly columns: SiteCells
  /** the same, one object a cell */
  readonly cells: readonly CellGeometry[]
  readonly lookup: CellLookup
  readonly role: Role
  /** whether the person may do the act here: hide what they may not */
  readonly can: (verb: Verb) => boolean
  readonly units: Units
  /** such as L8 */
  readonly label: (cell: number) => string
  readonly zone: (zoneId: string) => Zone | undefined
  readonly zoneOfCell: (cell: number) => Zone | undefined
  /** What the plan's drawing needs; the object stays the same while the plan does. */
  readonly plan: {
    readonly grid: Site['grid']
    readonly system: string
    readonly boundary: Site['boundary']
    readonly zones: readonly { readonly id: string; readonly name: string; readonly ring: Zone['ring'] }[]
    readonly cells: SiteCells
  }
}

const SiteContext = createContext<SiteContextValue | null>(null)

function geometryOf(columns: SiteCells): CellGeometry[] {
  return columns.column.map((column, cell) => ({
    cell,
    column,
    row: columns.row[cell] ?? 0,
    zone: columns.zone[cell] ?? -1,
    areaMm2: columns.areaMm2[cell] ?? 0,
    centroid: { u: columns.centroidU[cell] ?? 0, v: columns.centroidV[cell] ?? 0 },
    baseUm: columns.baseUm[cell] ?? 0,
    designUm: columns.designUm[cell] ?? 0,
  }))
}

/**
 * Gives the open site to the pages beneath it.
 * @throws Error when the site names a coordinate system that is not on the list
 */
export function SiteProvider({ site, columns, children }: { site: Site; columns: SiteCells; children: ReactNode }) {
  const { grid, crs, boundary, zones, unitSystem, timeZone } = site
  const cells = useMemo(() => geometryOf(columns), [columns])
  const lookup = useMemo(() => makeCellLookup(cells, grid.columns), [cells, grid.columns])
  const units = useMemo(() => makeUnits(unitSystem, timeZone), [unitSystem, timeZone])
  const plan = useMemo(() => ({ grid, system: crs, boundary, zones: zones.map(({ id, name, ring }) => ({ id, name, ring })), cells: columns }), [grid, crs, boundary, zones, columns])
  const value = useMemo<SiteContextValue>(() => {
    const system = findCoordinateSystem(site.crs)
    if (system === undefined) throw new Error(`The site's coordinate system ${site.crs} is not known here`)
    const zonesById = new Map(site.zones.map((zone) => [zone.id, zone]))
    const zonesByIndex = new Map(site.zones.map((zone) => [zone.index, zone]))
    return {
      site,
      system,
      columns,
      cells,
      lookup,
      units,
      plan,
      role: site.role,
      can: (verb) => can(site.role, verb),
      label: (cell) => {
        const address = lookup.addressOf(cell)
        return address === undefined ? '' : cellLabel(address)
      },
      zone: (zoneId) => zonesById.get(zoneId),
      zoneOfCell: (cell) => zonesByIndex.get(cells[cell]?.zone ?? -1),
    }
  }, [site, columns, cells, lookup, units, plan])
  return <SiteContext value={value}>{children}</SiteContext>
}

/**
 * The open site.
 * @throws Error outside a page of a site
 */
export function useSite(): SiteContextValue {
  const value = useContext(SiteContext)
  if (value === null) throw new Error('useSite() is for pages of a site')
  return value
}

/** How the open site writes and reads figures and times. */
export function useUnits(): Units {
  return useSite().units
}
