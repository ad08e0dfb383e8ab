import { GROUND_FLAGS, groundStateCode, type GroundFlag, type GroundState } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { TestSummary } from '#shared/schemas/field-test.ts'
import type { Board } from '#shared/schemas/ground.ts'
import type { Material } from '#shared/schemas/lab.ts'
import type { Placement } from '#shared/schemas/placement.ts'
import type { Release } from '#shared/schemas/release.ts'
import type { Order } from '#shared/schemas/rework.ts'
import type { Site, SiteCells } from '#shared/schemas/site.ts'
import { convertVolume, toCubicCentimetres } from '#shared/units/volume.ts'
import { buildGroundPlan, type GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { buildCellColumns, buildSiteView, buildTotals, ZONE_ID } from './site-view.ts'

export const COURT_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d11'
const NOW = '2026-12-01T22:32:07.000Z'

/** 50 ft by 50 ft by 8 in: 61.7 yd³ */
export const CELL_LIFT_CM3 = 15_240 ** 2 * 0.2032

/** The site of buildSiteView, its last column (D1, D2, D3) a second zone of lifts 6 in thick. */
export function buildTwoZoneSite(overrides: Partial<Site> = {}): Site {
  const site = buildSiteView(overrides)
  const [pad] = site.zones
  if (pad === undefined) throw new Error('The site of buildSiteView has a zone')
  const court = { ...pad, id: COURT_ID, index: 1, name: 'Truck court', shortName: 'Court', liftPlan: { kind: 'level', datumUm: 0, thicknessUm: 152_400 } as const }
  return { ...site, zones: [pad, court] }
}

export function buildTwoZoneCells(): SiteCells {
  const columns = buildCellColumns()
  return { ...columns, zone: columns.column.map((column) => (column === 3 ? 1 : 0)) }
}

export function buildPlan(site: Site = buildTwoZoneSite(), columns: SiteCells = buildTwoZoneCells()): GroundPlan {
  return buildGroundPlan(
    site,
    columns.column.map((column, cell) => ({
      cell,
      column,
      row: columns.row[cell] ?? 0,
      zone: columns.zone[cell] ?? -1,
      areaMm2: columns.areaMm2[cell] ?? 0,
      centroid: { u: columns.centroidU[cell] ?? 0, v: columns.centroidV[cell] ?? 0 },
      baseUm: columns.baseUm[cell] ?? 0,
      designUm: columns.designUm[cell] ?? 0,
    })),
  )
}

export type StandingOf = { readonly lift: number; readonly state: GroundState; readonly flags?: readonly GroundFlag[]; readonly lot?: number; readonly test?: number }

/** A surface sheet of 12 cells: lift 1 released, but for the cells named. */
export function buildSheet(cells: Readonly<Record<number, StandingOf>> = {}): GroundSheet {
  const standings = Array.from({ length: 12 }, (_, cell): StandingOf => cells[cell] ?? { lift: 1, state: 'released' })
  return {
    revision: 7,
    cut: { kind: 'surface' },
    state: Uint8Array.from(standings, ({ state }) => groundStateCode(state)),
    flags: Uint8Array.from(standings, ({ flags = [] }) => flags.reduce((bits, flag) => bits | GROUND_FLAGS[flag], 0)),
    lift: Int16Array.from(standings, ({ lift }) => lift),
    top: Int32Array.from(standings, ({ lift }) => lift * 2_032),
    lot: Uint32Array.from(standings, ({ lot = 0 }) => lot),
    test: Uint32Array.from(standings, ({ test = 0 }) => test),
  }
}

type Group = Board['notYet'][number]

export function buildNotYet(overrides: Partial<Group>): Group {
  return {
    reason: 'awaiting-test',
    zoneId: ZONE_ID,
    lift: 2,
    cells: [0, 1],
    cm3: 2 * CELL_LIFT_CM3,
    owed: 0,
    stakes: [],
    orderId: null,
    orderNumber: null,
    orderState: null,
    workingSince: null,
    lotId: null,
    lotName: null,
    testNumber: null,
    testId: null,
    headline: '',
    ...overrides,
  }
}

/** A board on which two cells are ready and every reason of a not-yet stands once. */
export function buildBoard(overrides: Partial<Board> = {}): Board {
  return {
    revision: 7,
    at: NOW,
    totals: buildTotals({ placedCm3: 12 * CELL_LIFT_CM3, spokenForCm3: 11.9999 * CELL_LIFT_CM3, testsRequired: 9, testsTaken: 7, testsOwed: 2, cellsInRework: 2, openOrders: 1 }),
    lifts: [
      { zoneId: ZONE_ID, lift: 1, states: [{ state: 'released', cells: 6, cm3: 0 }, { state: 'rework', cells: 3, cm3: 0 }] },
      { zoneId: ZONE_ID, lift: 2, states: [{ state: 'not-placed', cells: 9, cm3: 0 }] },
    ],
    ready: [{ zoneId: ZONE_ID, lift: 2, cells: [4, 5], cm3: 2 * CELL_LIFT_CM3, topUm: 406_400, thicknessUm: 203_200 }],
    notYet: [
      buildNotYet({ owed: 2, stakes: ['N1', 'N2'], cells: [0, 1] }),
      buildNotYet({ reason: 'rework', cells: [2, 6], orderId: 'order-1', orderNumber: 'R-014', orderState: 'working', workingSince: NOW, headline: 'Too dry. Add water.' }),
      buildNotYet({ reason: 'suspect', cells: [8], testId: 'test-218', testNumber: 'T-0218' }),
      buildNotYet({ reason: 'awaiting-release', cells: [9], lotId: 'lot-1', lotName: 'Pad L2, Dec 1' }),
      buildNotYet({ reason: 'awaiting-inspection', lift: 0, cells: [10] }),
      buildNotYet({ reason: 'at-grade', cells: [11] }),
    ],
    zones: [{ zoneId: ZONE_ID, designCm3: 1e9, placedCm3: 4.1299e8, releasedCm3: 2e8, lots: 3, owed: 2 }],
    doubtful: [{ testId: 'test-218', number: 'T-0218', cell: 8, lift: 2, headline: 'Result can’t be right, run it again' }],
    exceptions: [{ kind: 'covered-early', text: '4 cells covered too early', detail: 'Building pad, lift 1', cells: [0], lift: 1, testId: null }],
    verification: { tests: 5, failing: 1 },
    ...overrides,
  }
}

export function buildOrder(overrides: Partial<Order> = {}): Order {
  return {
    id: 'order-1',
    number: 'R-014',
    zoneId: ZONE_ID,
    lift: 2,
    lotId: null,
    cells: [2, 6],
    state: 'working',
    cause: null,
    actions: ['too-dry'],
    headline: 'Too dry. Add water.',
    volumeCm3: 2 * CELL_LIFT_CM3,
    // 5,680 US gallons
    waterLitres: convertVolume(5_680, 'gal', 'L'),
    depthUm: 203_200,
    passesWanted: 8,
    machine: 'Sheepsfoot roller',
    assignedTo: null,
    openedAt: NOW,
    workingSince: NOW,
    reportedAt: null,
    closedAt: null,
    retestsWanted: 1,
    retestsPassed: 0,
    retestPoints: [],
    edges: [],
    steps: [],
    openedBy: { id: 'u1', name: 'Ines Marsh' },
    ...overrides,
  }
}

export function buildRelease(overrides: Partial<Release> = {}): Release {
  return {
    id: 'release-1',
    number: 'A-012',
    zoneId: ZONE_ID,
    lift: 2,
    cells: [{ cell: 9, revoked: null }],
    volumeCm3: CELL_LIFT_CM3,
    status: 'asked',
    hold: false,
    askedBy: { id: 'u2', name: 'Rosa Okafor' },
    issuedBy: null,
    issuedAt: null,
    acceptedBy: null,
    acceptedAt: null,
    declinedReason: null,
    overrideReason: null,
    remarks: '',
    ...overrides,
  }
}

/** Half of its loose volume is left when it is compacted. */
export function buildMaterial(overrides: Partial<Material> = {}): Material {
  return { id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d21', name: 'North cut', source: '', classification: '', swellPercent: 25, shrinkPercent: 37.5, gs: null, gsMeasured: false, looseToCompacted: 0.5, ...overrides }
}

export function buildPlacement(overrides: Partial<Placement> = {}): Placement {
  return {
    id: 'placement-1',
    number: 'P-0001',
    zoneId: ZONE_ID,
    lift: 1,
    materialId: buildMaterial().id,
    materialName: 'North cut',
    happenedAt: NOW,
    recordedAt: NOW,
    recordedBy: { id: 'u1', name: 'Ines Marsh' },
    cells: [],
    loads: 10,
    loadVolumeCm3: toCubicCentimetres(20, 'yd3'),
    looseThicknessUm: null,
    machine: 'Roller 2',
    passes: null,
    remarks: '',
    geometryCm3: 0,
    loadsCm3: 0,
    drivingCm3: 0,
    differencePercent: null,
    differenceFlagged: false,
    coverReason: null,
    voided: null,
    ...overrides,
  }
}

export function buildTestSummary(overrides: Partial<TestSummary> = {}): TestSummary {
  return {
    id: 'test-1',
    number: 'T-0001',
    seq: 1,
    purpose: 'required',
    method: 'plain',
    zoneId: ZONE_ID,
    lift: 1,
    cell: 0,
    lotId: null,
    easting: 1_281_425,
    northing: 231_925,
    sampledAt: NOW,
    recordedBy: { id: 'u1', name: 'Tomas Reed' },
    curveId: 'curve-1',
    curveCode: 'C-1',
    outcome: 'pass',
    treatedAsFail: false,
    near: false,
    headline: 'Meets spec',
    rc: 97.2,
    moisture: 12,
    moistureDeviation: 0.6,
    dryDensity: 1_850,
    current: true,
    superseded: false,
    voided: false,
    flagged: false,
    ...overrides,
  }
}
