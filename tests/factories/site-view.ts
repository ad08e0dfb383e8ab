import type { GroundTotals } from '#shared/ground-codec.ts'
import type { Site, SiteCells, SiteListItem } from '#shared/schemas/site.ts'

export const SITE_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d01'
export const ZONE_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d02'

export function buildTotals(overrides: Partial<GroundTotals> = {}): GroundTotals {
  return { placedTodayCm3: 0, placedCm3: 0, spokenForCm3: 0, testsRequired: 0, testsTaken: 0, testsOwed: 0, cellsInRework: 0, openOrders: 0, readyCm3: 0, readyCells: 0, ...overrides }
}

const RING = [
  { easting: 1_281_400, northing: 231_950 },
  { easting: 1_281_600, northing: 231_950 },
  { easting: 1_281_600, northing: 231_800 },
  { easting: 1_281_400, northing: 231_800 },
]

/** An invented site as GET /api/sites/:siteId answers it: 4 by 3 cells of 50 ft in one zone. */
export function buildSiteView(overrides: Partial<Site> = {}): Site {
  return {
    id: SITE_ID,
    name: 'Alder Flats yard',
    subtitle: 'Phase 2 fill',
    role: 'qc-lead',
    crs: 'EPSG:2285',
    unitSystem: 'us',
    timeZone: 'America/Los_Angeles',
    dayCutHour: 0,
    verticalDatum: 'NAVD 88',
    waterDensity: 1000,
    grid: { origin: { easting: 1_281_400, northing: 231_950 }, cellSize: 50, columns: 4, rows: 3, rotationDeg: 0, unit: 'us-ft' },
    boundary: RING,
    areaMm2: 14.6 * 43_560 * 304.8 ** 2,
    zones: [
      {
        id: ZONE_ID,
        index: 0,
        name: 'Building pad',
        shortName: 'Pad',
        purpose: 'structural-fill',
        ring: RING,
        liftPlan: { kind: 'level', datumUm: 0, thicknessUm: 203_200 },
        holds: { foundation: false, firstLift: false, everyLift: false, finalGrade: false },
        volumeBasis: 'geometry',
        lotBasis: 'lift-day',
        minBaseUm: 0,
        maxDesignUm: 2_032_000,
        designCm3: 1e9,
        specification: {
          id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d03',
          version: 1,
          createdAt: '2026-11-01T16:00:00.000Z',
          title: 'Structural fill',
          criteria: [{ kind: 'rc-min', text: '95' }],
          rounding: { method: 'absolute' },
          frequency: [{ kind: 'volume', scope: 'lot', perCm3: 382_277_429 }],
          remainderTolerancePercent: 0,
          repeatability: { rc: 1, moisture: 1 },
          stakeRetireMm: 1_500,
          stakeSetbackMm: 1_000,
          requiredOnlyAtStakes: false,
        },
      },
    ],
    cellsHash: 'hash-1',
    revision: 7,
    now: '2026-12-01T22:32:07.000Z',
    ...overrides,
  }
}

/** The cells of buildSiteView, as GET /api/sites/:siteId/cells answers them. */
export function buildCellColumns(): SiteCells {
  const cells = Array.from({ length: 12 }, (_, cell) => cell)
  const columns = cells.map((cell) => cell % 4)
  const rows = cells.map((cell) => Math.floor(cell / 4))
  return {
    hash: 'hash-1',
    column: columns,
    row: rows,
    zone: cells.map(() => 0),
    areaMm2: cells.map(() => 15_240 ** 2),
    centroidU: columns.map((column) => (column + 0.5) * 15_240),
    centroidV: rows.map((row) => (row + 0.5) * 15_240),
    baseUm: cells.map(() => 0),
    designUm: cells.map(() => 2_032_000),
  }
}

export function buildSiteListItem(overrides: Partial<SiteListItem> = {}): SiteListItem {
  const { id, name, subtitle, role, unitSystem, areaMm2 } = buildSiteView()
  return { id, name, subtitle, role, unitSystem, areaMm2, cells: 12, columns: 4, rows: 3, totals: buildTotals(), ...overrides }
}
