import type { InputIssue } from '#api/http/validate.ts'
import { findCoordinateSystem, toLonLat } from '#shared/domain/coordinate-systems.ts'
import { cellSideMm, siteToGrid } from '#shared/domain/grid.ts'
import { criterionProblems } from '#shared/domain/limits.ts'
import { measureRing } from '#shared/domain/plan-ring.ts'
import type { PlanUnit, SiteRing } from '#shared/domain/site-geometry.ts'
import { checkRing } from '#shared/domain/zone-ring.ts'
import { SITE_LIMITS } from '#shared/schemas/site.ts'
import type { CreateSite, SpecificationInput } from '#shared/schemas/site.ts'

const UNIT_NAMES: Readonly<Record<PlanUnit, string>> = { m: 'metres', ft: 'international feet', 'us-ft': 'US survey feet' }

/** A corner of the boundary may stand this far over the grid's edge, mm: coordinates are given to 0.01 ft or so. */
const OVER_THE_EDGE_MM = 5

/** What is wrong with a site as entered, before any cell is made. */
export function siteProblems(input: CreateSite): InputIssue[] {
  return [
    ...placeProblems(input),
    ...outlineProblems(input),
    ...nameProblems(input),
    ...input.zones.flatMap((zone, i) => specificationProblems(zone.specification, `body.zones.${i}.specification`)),
  ]
}

function placeProblems({ crs, timeZone, grid, boundary }: CreateSite): InputIssue[] {
  const issues: InputIssue[] = []
  const system = findCoordinateSystem(crs)
  if (!system) {
    issues.push({ path: 'body.crs', message: `The coordinate system ${crs} is not on the list. Choose one of those listed.` })
  } else if (system.unit !== grid.unit) {
    const message = `${system.code} counts in ${UNIT_NAMES[system.unit]}, but the grid is in ${UNIT_NAMES[grid.unit]}.`
    issues.push({ path: 'body.grid.unit', message })
  } else if (!boundary.every((point) => toLonLat(system, point).every(Number.isFinite))) {
    issues.push({ path: 'body.boundary', message: `The boundary lies where ${system.code} has no place. Check its coordinates.` })
  }
  if (!isTimeZone(timeZone)) {
    issues.push({ path: 'body.timeZone', message: `${timeZone || 'An empty name'} is not a known time zone. Choose one such as America/Denver.` })
  }
  return issues
}

function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en-US', { timeZone: name }).resolvedOptions().timeZone !== ''
  } catch {
    return false
  }
}

function outlineProblems({ grid, boundary, zones }: CreateSite): InputIssue[] {
  const issues: InputIssue[] = []
  if (grid.columns * grid.rows > 4 * SITE_LIMITS.cells) {
    issues.push({ path: 'body.grid', message: `The grid has ${grid.columns} by ${grid.rows} cells, more than can be kept. Choose larger cells.` })
  }
  const outer = checkRing(boundary)
  if (!outer.ok) return [...issues, { path: 'body.boundary', message: `Boundary: ${outer.reason}` }]
  const out = pointOutsideGrid(grid, boundary)
  if (out !== null) issues.push({ path: 'body.grid', message: `The grid does not cover the boundary: its point ${out} lies outside.` })
  const cells = Math.round((measureRing(boundary.map((point) => siteToGrid(grid, point)))?.areaMm2 ?? 0) / cellSideMm(grid) ** 2)
  if (cells > SITE_LIMITS.cells) issues.push({ path: 'body.grid', message: tooManyCells(`about ${cells.toLocaleString('en-US')}`) })
  zones.forEach((zone, i) => {
    const check = checkRing(zone.ring, boundary)
    if (!check.ok) issues.push({ path: `body.zones.${i}.ring`, message: `Zone ${zone.name}: ${check.reason}` })
  })
  return issues
}

export function tooManyCells(count: string): string {
  return `The site would have ${count} cells; ${SITE_LIMITS.cells.toLocaleString('en-US')} is the most. Choose larger cells.`
}

/** The first point of the boundary, counted from 1, that no row or column of the grid reaches. */
function pointOutsideGrid(grid: CreateSite['grid'], boundary: SiteRing): number | null {
  const side = cellSideMm(grid)
  const within = (value: number, count: number) => value >= -OVER_THE_EDGE_MM && value <= count * side + OVER_THE_EDGE_MM
  const index = boundary.findIndex((point) => {
    const { u, v } = siteToGrid(grid, point)
    return !within(u, grid.columns) || !within(v, grid.rows)
  })
  return index < 0 ? null : index + 1
}

function nameProblems({ zones }: CreateSite): InputIssue[] {
  const issues: InputIssue[] = []
  for (const [field, label] of [['id', 'identifier'], ['name', 'name'], ['shortName', 'short name']] as const) {
    const seen = new Map<string, number>()
    zones.forEach((zone, i) => {
      const key = zone[field].toLowerCase()
      const before = seen.get(key)
      if (before === undefined) seen.set(key, i)
      else issues.push({ path: `body.zones.${i}.${field}`, message: `Zones ${before + 1} and ${i + 1} have the same ${label}.` })
    })
  }
  return issues
}

/** What is wrong with the limits of a specification. */
export function specificationProblems(specification: SpecificationInput, path: string): InputIssue[] {
  return specification.criteria
    .flatMap((criterion, i) => criterionProblems(criterion, `${path}.criteria.${i}`))
    .map(({ field, message }) => ({ path: field, message }))
}
