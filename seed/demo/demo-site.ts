import { wholeRuleAmount } from '#shared/domain/frequency-rule.ts'
import { gridToSite } from '#shared/domain/grid.ts'
import type { GridDefinition, SitePoint } from '#shared/domain/site-geometry.ts'
import type { CreateCurve, CreateMaterial } from '#shared/schemas/lab.ts'
import type { CreateSite, SpecificationInput, ZoneInput } from '#shared/schemas/site.ts'
import { convertDensity } from '#shared/units/density.ts'
import { toMicrometres } from '#shared/units/length.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { Chance } from '#seed/demo/demo-random.ts'

const FOOT_UM = 304_800
/** bottom of lift 1 everywhere: 412 ft 8 in */
export const DATUM_UM = 412 * FOOT_UM + toMicrometres(8, 'in')
export const LIFT_UM = toMicrometres(8, 'in')
const CELL_MM = (50 * 1200 * 1000) / 3937

const GRID: GridDefinition = {
  origin: { easting: 1_584_210, northing: 412_960 },
  cellSize: 50,
  columns: 24,
  rows: 19,
  rotationDeg: 11.2,
  unit: 'us-ft',
}

/** A ring given in cells: columns to the right, rows downward, from the corner of A1. */
function ringOfCells(corners: readonly (readonly [column: number, row: number])[]): SitePoint[] {
  return corners.map(([column, row]) => {
    const { easting, northing } = gridToSite(GRID, { u: column * CELL_MM, v: row * CELL_MM })
    return { easting: Math.round(easting * 1000) / 1000, northing: Math.round(northing * 1000) / 1000 }
  })
}

const WEST = [[0, 14], [0, 4], [1, 4], [1, 0]] as const
const EAST = [[21, 0], [21, 3], [22, 3], [22, 6], [24, 6], [24, 13]] as const
const SOUTH = [[24, 14], [23, 14], [22.5, 18], [16, 18], [16, 19], [5, 19], [5, 17], [2, 17], [2, 14]] as const

/** Existing ground: falls about two feet from north to south, with a shallow swale. */
function groundFeet(column: number, row: number): number {
  const fall = 415.1 - 2.3 * (row / 19)
  const swale = 0.55 * Math.exp(-(((column - 15) / 6) ** 2)) * Math.sin(row / 3.2)
  return Math.max(412.72, fall - swale + 0.22 * Math.sin(column / 4.1))
}

function groundPoints(): { easting: number; northing: number; elevationUm: number }[] {
  const points = []
  for (let row = -1; row <= 20; row += 1.5) {
    for (let column = -1; column <= 25; column += 1.5) {
      points.push({ ...gridToSite(GRID, { u: column * CELL_MM, v: row * CELL_MM }), elevationUm: Math.round((groundFeet(column, row) * FOOT_UM) / 100) * 100 })
    }
  }
  return points
}

function specification(overrides: Partial<SpecificationInput>): SpecificationInput {
  return {
    title: 'Structural fill',
    criteria: [
      { kind: 'rc-min', text: '95' },
      { kind: 'moisture-band', lowText: '-2.0', highText: '+2.0' },
    ],
    rounding: { method: 'rounding', ties: 'even' },
    frequency: [{ kind: 'volume', scope: 'lot', perCm3: wholeRuleAmount(convertVolume(500, 'yd3', 'cm3')) }],
    remainderTolerancePercent: 0,
    repeatability: { rc: 0.5, moisture: 0.3 },
    stakeRetireMm: 3_000,
    stakeSetbackMm: 1_500,
    requiredOnlyAtStakes: false,
    ...overrides,
  }
}

const designOf = (lift: number): ZoneInput['design'] => ({ kind: 'level', elevationUm: DATUM_UM + lift * LIFT_UM })

export function demoSiteInput(chance: Chance): CreateSite {
  const zone = {
    liftPlan: { kind: 'level', datumUm: DATUM_UM, thicknessUm: LIFT_UM },
    volumeBasis: 'geometry',
    lotBasis: 'lift-day',
  } as const
  return {
    id: chance.id(),
    name: 'Alder Flats yard',
    subtitle: 'Phase 2 fill',
    crs: 'EPSG:2285',
    unitSystem: 'us',
    timeZone: 'America/Los_Angeles',
    dayCutHour: 5,
    verticalDatum: 'NAVD 88',
    waterDensity: 1000,
    grid: GRID,
    boundary: ringOfCells([...WEST, ...EAST, ...SOUTH]),
    ground: { kind: 'points', points: groundPoints() },
    zones: [
      {
        ...zone,
        id: chance.id(),
        name: 'Building pad',
        shortName: 'Pad',
        purpose: 'structural-fill',
        ring: ringOfCells([[6, 3], [17, 3], [17, 13], [6, 13]]),
        design: designOf(11),
        holds: { foundation: true, firstLift: false, everyLift: false, finalGrade: true },
        specification: specification({}),
      },
      {
        ...zone,
        id: chance.id(),
        name: 'Truck court',
        shortName: 'Truck court',
        purpose: 'roadway',
        ring: ringOfCells([[0, 13], ...WEST.slice(1), ...EAST]),
        design: designOf(9),
        holds: { foundation: false, firstLift: false, everyLift: false, finalGrade: true },
        specification: specification({ title: 'Pavement support' }),
      },
      {
        ...zone,
        id: chance.id(),
        name: 'Basin embankment',
        shortName: 'Basin',
        purpose: 'embankment',
        ring: ringOfCells([[0, 13], [24, 13], ...SOUTH, [0, 14]]),
        design: designOf(6),
        holds: { foundation: false, firstLift: true, everyLift: false, finalGrade: false },
        specification: specification({
          title: 'Embankment',
          criteria: [
            { kind: 'rc-min', text: '95' },
            { kind: 'moisture-band', lowText: '-1.0', highText: '+3.0' },
          ],
        }),
      },
    ],
  }
}

/** A second site with nothing on it yet, for somebody who wants to try. */
export function emptySiteInput(chance: Chance): CreateSite {
  const grid: GridDefinition = { origin: { easting: 1_601_400, northing: 398_120 }, cellSize: 25, columns: 12, rows: 8, rotationDeg: 0, unit: 'us-ft' }
  const corner = (column: number, row: number) => ({ easting: grid.origin.easting + column * grid.cellSize, northing: grid.origin.northing - row * grid.cellSize })
  const ring = [corner(0, 8), corner(12, 8), corner(12, 0), corner(0, 0)]
  return {
    id: chance.id(),
    name: 'Tamarack bench',
    subtitle: 'Warehouse pad',
    crs: 'EPSG:2285',
    unitSystem: 'us',
    timeZone: 'America/Los_Angeles',
    dayCutHour: 5,
    verticalDatum: 'NAVD 88',
    waterDensity: 1000,
    grid,
    boundary: ring,
    ground: { kind: 'level', elevationUm: 500 * FOOT_UM },
    zones: [
      {
        id: chance.id(),
        name: 'Warehouse pad',
        shortName: 'Pad',
        purpose: 'structural-fill',
        ring,
        liftPlan: { kind: 'level', datumUm: 500 * FOOT_UM, thicknessUm: LIFT_UM },
        design: { kind: 'level', elevationUm: 500 * FOOT_UM + 6 * LIFT_UM },
        holds: { foundation: false, firstLift: false, everyLift: false, finalGrade: true },
        volumeBasis: 'geometry',
        lotBasis: 'lift-day',
        specification: specification({}),
      },
    ],
  }
}

export function demoMaterials(chance: Chance): { ridge: CreateMaterial; pitRun: CreateMaterial } {
  return {
    ridge: { id: chance.id(), name: 'Ridge borrow', source: 'Cut at the east ridge', classification: 'Silty clay, CL', swellPercent: 28, shrinkPercent: 10, gs: 2.68, gsMeasured: true },
    pitRun: { id: chance.id(), name: 'Pit run', source: 'Lower pit', classification: 'Silty sand with gravel, SM', swellPercent: 14, shrinkPercent: 6, gs: 2.66, gsMeasured: true },
  }
}

type CurveFor = Pick<CreateCurve, 'code' | 'materialId' | 'method' | 'procedure' | 'gs'> &
  Partial<Pick<CreateCurve, 'coarse' | 'entry' | 'apparatus'>> & { readonly pcf?: readonly (readonly [number, number])[]; readonly sampledAt: Date }

export function demoCurve(chance: Chance, { pcf = [], sampledAt, ...curve }: CurveFor): CreateCurve {
  return {
    coarse: null,
    ...curve,
    id: chance.id(),
    gsMeasured: true,
    reported: null,
    points: pcf.map(([moisture, density]) => ({ moisture, dryDensity: convertDensity(density, 'pcf', 'kg/m3') })),
    sampledAt: sampledAt.toISOString(),
  }
}
