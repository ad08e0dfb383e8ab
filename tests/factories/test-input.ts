import { randomUUID } from 'node:crypto'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { CELL_FEET, SITE_COLUMNS, SITE_ORIGIN } from '#tests/factories/site-input.ts'

/** The middle of a cell of the small site, moved by feet to the right and down. */
export function middleOf(cell: number, right = 0, down = 0): CreateTest['at'] {
  const column = cell % SITE_COLUMNS
  const row = Math.floor(cell / SITE_COLUMNS)
  return { easting: SITE_ORIGIN.easting + (column + 0.5) * CELL_FEET + right, northing: SITE_ORIGIN.northing - (row + 0.5) * CELL_FEET - down }
}

/** A plain sheet as a report states it: dry unit weight in pcf and moisture in percent. */
export function drySheet(pcf: number, moisture: number): CreateTest['sheet'] {
  return { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: pcf, moisture: { method: 'stated', percent: moisture } }
}

/** Against the small site's curve of 120.0 pcf at 12.0 %: meets, is too loose, is too dry, and lies above zero air voids. */
export const PASSING = drySheet(117.6, 12)
export const TOO_LOOSE = drySheet(110.4, 12)
export const TOO_DRY = drySheet(117.6, 8)
export const SUSPECT = drySheet(117.6, 17)

/** What POST …/tests takes: a required test that passes in the middle of cell A1, lift 1. */
export function testInput(open: OpenSite, overrides: Partial<CreateTest> = {}): CreateTest {
  return {
    id: randomUUID(),
    purpose: 'required',
    follows: null,
    stakeId: null,
    at: middleOf(0),
    lift: 1,
    liftConfirmed: false,
    surfaceUm: null,
    depthUm: 152_400,
    sampledAt: new Date(Date.now() - 60_000).toISOString(),
    curveId: open.curve.id,
    oversizePercent: null,
    sheet: PASSING,
    remarks: '',
    ...overrides,
  }
}
