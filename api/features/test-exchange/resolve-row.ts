import type { ExchangeReferences } from '#api/features/test-exchange/exchange-references.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { calibratedReading } from '#shared/domain/calibrated-reading.ts'
import { parseCellLabel } from '#shared/domain/cell-label.ts'
import { gridToSite } from '#shared/domain/grid.ts'
import type { SitePoint } from '#shared/domain/site-geometry.ts'
import type { ColumnKey } from '#shared/exchange/test-columns.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { ImportTest, RowProblem } from '#shared/schemas/test-exchange.ts'

export type ResolvedRow = { readonly ok: true; readonly input: CreateTest } | { readonly ok: false; readonly problems: readonly RowProblem[] }

interface Site {
  readonly plan: SitePlan
  readonly references: ExchangeReferences
  /** the test of this site with a number, or undefined */
  idOfNumber(number: string): string | undefined
}

/** The point that a cell's middle is recorded at: to a thousandth of the site's unit, as the sheet has it. */
const toThousandths = (value: number): number => Math.round(value * 1000) / 1000

/** Where a row says that it was taken; undefined for a cell this site does not have. */
export function pointOf(plan: SitePlan, place: ImportTest['place']): SitePoint | undefined {
  if (!('cell' in place)) return place
  const address = parseCellLabel(place.cell)
  const cell = address && plan.lookup.at(address.column, address.row)
  const geometry = cell === undefined ? undefined : plan.cells[cell]
  if (!geometry) return undefined
  const { easting, northing } = gridToSite(plan.site.grid, geometry.centroid)
  return { easting: toThousandths(easting), northing: toThousandths(northing) }
}

/** A row as the test that would be recorded: every name in it found among what this site has; another site's is not there. */
export function resolveRow(row: ImportTest, site: Site): ResolvedRow {
  const problems: RowProblem[] = []
  const fail = (column: ColumnKey, message: string): void => void problems.push({ column, message })
  const at = pointOf(site.plan, row.place)
  if (!at) fail('cell', 'This site has no such cell. Write it as N4, or give easting and northing.')
  const curve = site.references.curves.find(({ code }) => code === row.curve) ?? site.references.curves.find(({ code }) => code.toLowerCase() === row.curve.toLowerCase())
  if (!curve) fail('curve', `This site has no curve ${row.curve}. Correct the code, or record the curve in the laboratory first.`)
  const stake = row.stake === null || !at ? null : nearestStake(site.references, row.stake, at)
  if (stake === undefined) fail('stake', `No stake ${row.stake} stands here. Correct its label, or clear it.`)
  const follows = readFollows(row, site, fail)
  const sheet = withIds(row, site.references, fail)
  const { place: _place, stake: _stake, curve: _curve, gauge: _gauge, moistureGauge: _moistureGauge, calibrations: _calibrations, ...rest } = row
  if (problems.length > 0 || !at || !curve) return { ok: false, problems }
  return { ok: true, input: { ...rest, at, curveId: curve.id, stakeId: stake ?? null, follows, sheet } }
}

type Fail = (column: ColumnKey, message: string) => void

/** Labels start anew with each lot: of several, the stake next to the test. */
function nearestStake({ stakes }: ExchangeReferences, label: string, { easting, northing }: SitePoint): string | undefined {
  const distance = (stake: SitePoint): number => Math.hypot(stake.easting - easting, stake.northing - northing)
  const [nearest] = stakes.filter((stake) => stake.label.toLowerCase() === label.toLowerCase()).sort((a, b) => distance(a) - distance(b))
  return nearest?.id
}

function readFollows({ follows }: ImportTest, site: Site, fail: Fail): CreateTest['follows'] {
  if (follows === null) return null
  const testId = follows.record ?? (follows.number === null ? undefined : site.idOfNumber(follows.number))
  if (testId !== undefined) return { testId, kind: follows.kind }
  fail('follows', `There is no test ${follows.number ?? ''} on this site or in this file. Correct its number.`)
  return null
}

function withIds(row: ImportTest, references: ExchangeReferences, fail: Fail): CreateTest['sheet'] {
  const sheet = structuredClone(row.sheet)
  const gaugeId = (serial: string | null, column: ColumnKey): { gaugeId?: string } => {
    if (serial === null) return {}
    const found = references.gauges.find((gauge) => gauge.serial.toLowerCase() === serial.toLowerCase())
    if (!found) fail(column, `Gauge ${serial} is not in this site’s register. Correct its serial number, or add the gauge first.`)
    return found ? { gaugeId: found.id } : {}
  }
  if (sheet.method === 'nuclear-gauge') Object.assign(sheet, gaugeId(row.gauge, 'gauge'))
  if (sheet.moisture.method === 'gauge') {
    const own = sheet.method === 'nuclear-gauge' ? row.moistureGauge : (row.moistureGauge ?? row.gauge)
    Object.assign(sheet.moisture, gaugeId(own, row.moistureGauge === null ? 'gauge' : 'moistureGauge'))
  }
  const calibrationIds = findCalibrations(row, references, fail)
  return calibrationIds.length === 0 ? sheet : ({ ...sheet, calibrationIds } as CreateTest['sheet'])
}

function findCalibrations({ calibrations, sheet }: ImportTest, references: ExchangeReferences, fail: Fail): string[] {
  const used: string[] = []
  for (const { apparatus, performedAt } of calibrations) {
    const named = references.calibrations.filter((each) => each.apparatus === apparatus && each.performedAt.getTime() === Date.parse(performedAt) && !used.includes(each.id))
    const found = named.find((each) => each.voidedAt === null && calibratedReading(sheet, each) !== null) ?? named[0]
    if (found) used.push(found.id)
    else fail('calibrations', `This site has no calibration of ${apparatus} of that time. Correct it, or clear it.`)
  }
  return used
}
