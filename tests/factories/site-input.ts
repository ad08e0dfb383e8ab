import { randomUUID } from 'node:crypto'
import { wholeRuleAmount } from '#shared/domain/frequency-rule.ts'
import type { SiteRing } from '#shared/domain/site-geometry.ts'
import type { CreateSite, SpecificationInput, ZoneInput } from '#shared/schemas/site.ts'
import { convertVolume } from '#shared/units/volume.ts'

/** Top left corner of cell A1, US survey feet. */
export const SITE_ORIGIN = { easting: 1_300_000, northing: 400_250 } as const
export const SITE_COLUMNS = 6
export const SITE_ROWS = 5
/** US survey feet */
export const CELL_FEET = 50
/** 100 ft */
export const GROUND_UM = 30_480_000
/** 8 in */
export const LIFT_UM = 203_200
/** planned lifts of the zone, from level ground to level design */
export const LIFTS = 4

/** Corners of a rectangle of whole cells, from (column, row) counted from 0 to the far corner. */
export function cellsRing(column: number, row: number, columns: number, rows: number): SiteRing {
  const west = SITE_ORIGIN.easting + column * CELL_FEET
  const north = SITE_ORIGIN.northing - row * CELL_FEET
  const east = west + columns * CELL_FEET
  const south = north - rows * CELL_FEET
  return [
    { easting: west, northing: south },
    { easting: east, northing: south },
    { easting: east, northing: north },
    { easting: west, northing: north },
  ]
}

/** 95 % of the maximum, moisture 2 under to 2 over optimum, one test per 500 yd³ of a lot. */
export function specificationInput(overrides: Partial<SpecificationInput> = {}): SpecificationInput {
  return {
    title: 'Structural fill',
    criteria: [
      { kind: 'rc-min', text: '95' },
      { kind: 'moisture-band', lowText: '-2', highText: '2' },
    ],
    rounding: { method: 'rounding', ties: 'even' },
    frequency: [{ kind: 'volume', scope: 'lot', perCm3: wholeRuleAmount(convertVolume(500, 'yd3', 'cm3')) }],
    remainderTolerancePercent: 10,
    repeatability: { rc: 0.5, moisture: 0.5 },
    stakeRetireMm: 3_000,
    stakeSetbackMm: 1_500,
    requiredOnlyAtStakes: false,
    ...overrides,
  }
}

/** A zone over the whole small site: level lifts of 8 in, four of them, nothing held for the owner. */
export function zoneInput(overrides: Partial<ZoneInput> = {}): ZoneInput {
  return {
    id: randomUUID(),
    name: 'Pad',
    shortName: 'Pad',
    purpose: 'structural-fill',
    ring: [...cellsRing(0, 0, SITE_COLUMNS, SITE_ROWS)],
    liftPlan: { kind: 'level', datumUm: GROUND_UM, thicknessUm: LIFT_UM },
    design: { kind: 'level', elevationUm: GROUND_UM + LIFTS * LIFT_UM },
    holds: { foundation: false, firstLift: false, everyLift: false, finalGrade: false },
    volumeBasis: 'geometry',
    lotBasis: 'lift-day',
    specification: specificationInput(),
    ...overrides,
  }
}

/** What POST /api/sites takes: 6 by 5 cells of 50 ft (61.7 yd³ a lift each), one zone. Cells 0 to 29, A1 to F5. */
export function siteInput(overrides: Partial<CreateSite> = {}): CreateSite {
  return {
    id: randomUUID(),
    name: 'Juniper bench',
    subtitle: 'Building pad',
    crs: 'EPSG:2285',
    unitSystem: 'us',
    timeZone: 'America/Los_Angeles',
    dayCutHour: 5,
    verticalDatum: 'NAVD 88',
    waterDensity: 1000,
    grid: { origin: SITE_ORIGIN, cellSize: CELL_FEET, columns: SITE_COLUMNS, rows: SITE_ROWS, rotationDeg: 0, unit: 'us-ft' },
    boundary: [...cellsRing(0, 0, SITE_COLUMNS, SITE_ROWS)],
    ground: { kind: 'level', elevationUm: GROUND_UM },
    zones: [zoneInput()],
    ...overrides,
  }
}
