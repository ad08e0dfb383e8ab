import type { UnitGroup } from '#shared/exchange/exchange-units.ts'

/**
 * What a column is for. `input` is read and written: all of them together make the test again. `fallback` is written for
 * the reader and read only where the better column says nothing. `import` is only read, `workbook` only stands in workbooks,
 * `result` is worked out here: written, never read.
 */
export type ColumnRole = 'input' | 'fallback' | 'import' | 'workbook' | 'result'

export interface TestColumn {
  /** as it heads the column; a unit may follow in brackets */
  readonly label: string
  readonly role: ColumnRole
  readonly kind: 'text' | 'number' | 'instant'
  /** the unit it is read in: that of its group, told in the head, in a column beside or chosen for the file */
  readonly group?: UnitGroup
  /** the one unit it has */
  readonly unit?: string
  /** decimals a workbook shows; the value itself is whole */
  readonly decimals?: number
  /** what laboratories call it, small letters and digits only */
  readonly aliases?: readonly string[]
}

const text = (label: string, role: ColumnRole, ...aliases: string[]): TestColumn => ({ label, role, kind: 'text', aliases })
const figure = (label: string, group: UnitGroup, ...aliases: string[]): TestColumn => ({ label, role: 'input', kind: 'number', group, aliases })
const plain = (label: string, ...aliases: string[]): TestColumn => ({ label, role: 'input', kind: 'number', aliases })
const percent = (label: string, ...aliases: string[]): TestColumn => ({ label, role: 'input', kind: 'number', unit: '%', aliases })
const result = (label: string, unit?: string, decimals?: number): TestColumn => ({ label, role: 'result', kind: decimals === undefined ? 'text' : 'number', ...(unit === undefined ? {} : { unit }), ...(decimals === undefined ? {} : { decimals }) })

/**
 * Every column in which tests are exchanged, in the order it stands in a file. A test's own identity is `record`: the number
 * is given anew by the register that takes it in, so it is written for the reader and read only as the source's reference.
 */
export const TEST_COLUMNS = {
  record: text('Record', 'input', 'recordid', 'uuid', 'id'),
  number: text('Number', 'fallback', 'testnumber', 'testno', 'test', 'no', 'reference', 'ref', 'sample', 'sampleno', 'samplenumber', 'sampleid'),
  purpose: text('Purpose', 'input', 'testtype', 'testpurpose'),
  follows: text('Follows', 'fallback', 'retestof', 'rerunof', 'followstest'),
  followsRecord: text('Follows record', 'input'),
  followKind: text('Follow kind', 'input', 'retestorrerun', 'kindoffollow'),
  sampledAt: { label: 'Sampled at', role: 'input', kind: 'instant', aliases: ['date', 'datetime', 'dateandtime', 'testdate', 'sampledate', 'sampled', 'dateoftest', 'datetested', 'testedat'] },
  sampledTime: text('Time', 'import', 'testtime', 'sampletime', 'timeoftest', 'sampledtime'),
  utcOffset: text('UTC offset', 'workbook', 'offset'),
  zone: text('Zone', 'result'),
  easting: figure('Easting', 'plan', 'e', 'x', 'east'),
  northing: figure('Northing', 'plan', 'n', 'y', 'north'),
  cell: text('Cell', 'fallback', 'gridcell', 'location', 'station'),
  stake: text('Stake', 'input'),
  lift: plain('Lift', 'liftno', 'liftnumber', 'layer'),
  liftConfirmed: text('Lift confirmed', 'input'),
  surface: figure('Surface elevation', 'elevation', 'elevation', 'elev', 'surface', 'testelevation'),
  depth: figure('Depth', 'depth', 'testdepth', 'depthbelowsurface'),
  curve: text('Curve', 'input', 'curvecode', 'proctor', 'proctorno', 'proctorid', 'referencecurve', 'labcurve'),
  method: text('Method', 'input', 'testmethod', 'densitymethod'),
  massUnit: text('Mass unit', 'input'),
  densityUnit: text('Density unit', 'input'),
  volumeUnit: text('Volume unit', 'input'),
  lengthUnit: text('Length unit', 'input'),
  apparatusBefore: figure('Apparatus before', 'mass', 'initialapparatus', 'apparatusandsandbefore', 'jarandsandbefore', 'initialmass'),
  apparatusAfter: figure('Apparatus after', 'mass', 'finalapparatus', 'apparatusandsandafter', 'jarandsandafter', 'finalmass'),
  coneAndPlate: figure('Cone and plate', 'mass', 'sandincone', 'sandinconeandplate', 'cone'),
  sandDensity: figure('Sand density', 'density', 'bulkdensityofsand', 'sandunitweight'),
  volumeBefore: figure('Volume before', 'volume', 'indicatorontheplate', 'initialvolume', 'initialreading'),
  volumeAfter: figure('Volume after', 'volume', 'indicatorinthehole', 'finalvolume', 'finalreading'),
  moistSoil: figure('Moist soil', 'mass', 'moistsoilfromhole', 'wetsoil', 'wetsoilmass', 'massofwetsoil', 'soilfromhole'),
  cylinderAndSoil: figure('Cylinder and soil', 'mass', 'cylinderpluswetsoil', 'tubeandsoil'),
  cylinder: figure('Cylinder', 'mass', 'cylinderempty', 'tube', 'emptycylinder'),
  volumeBy: text('Volume by', 'input'),
  cylinderVolume: figure('Cylinder volume', 'volume', 'tubevolume'),
  cylinderDiameter: figure('Cylinder diameter', 'length', 'innerdiameter', 'diameter'),
  cylinderHeight: figure('Cylinder height', 'length', 'height'),
  largestParticle: figure('Largest particle', 'length', 'maxparticle', 'maximumparticle', 'largestparticleifseen'),
  calibrations: text('Calibrations', 'input'),
  gauge: text('Gauge', 'input', 'gaugeserial', 'gaugeno', 'gaugenumber', 'gaugeid', 'serial', 'serialnumber'),
  gaugeMode: text('Gauge mode', 'input', 'mode'),
  rodDepth: figure('Rod depth', 'length', 'probedepth', 'sourcedepth', 'rod'),
  wetDensity: figure('Wet density', 'density', 'wd', 'wetunitweight', 'moistdensity', 'bulkdensity', 'wetdens'),
  secondWetDensity: figure('Second wet density', 'density', 'wetdensity2', 'secondreading'),
  dryDensity: figure('Dry density', 'density', 'dd', 'dryunitweight', 'drydens'),
  standardDensity: plain('Standard count, density', 'densitystandardcount', 'densitystandard', 'dsstandard', 'ds'),
  standardMoisture: plain('Standard count, moisture', 'moisturestandardcount', 'moisturestandard', 'ms'),
  referenceDensity: plain('Reference count, density'),
  referenceMoisture: plain('Reference count, moisture'),
  moistureMethod: text('Moisture method', 'input', 'moistureby'),
  tinUnit: text('Tin mass unit', 'input'),
  wetAndTin: figure('Wet soil and tin', 'tin', 'wetsoiltin', 'tinandwetsoil', 'tarepluswet', 'wetandtare'),
  dryAndTin: figure('Dry soil and tin', 'tin', 'drysoiltin', 'tinanddrysoil', 'tareplusdry', 'dryandtare'),
  tin: figure('Tin', 'tin', 'tare', 'taremass', 'tinmass', 'container'),
  earlier: { label: 'Earlier weighings', role: 'input', kind: 'text', group: 'tin', aliases: ['earlierdryweighings'] },
  carbideReading: percent('Carbide reading', 'speedy', 'carbide'),
  waterUnit: text('Moisture density unit', 'input'),
  moistureDensity: figure('Moisture density', 'water', 'moisturedens', 'waterdensity', 'massofwater'),
  correctionK: plain('Moisture correction K', 'k', 'moisturecorrection', 'correctionk'),
  wallAppliedBy: text('Wall offset applied by', 'input'),
  wallConvention: text('Wall offset convention', 'input'),
  wallOffset: figure('Wall offset', 'water', 'trenchoffset'),
  moistureGauge: text('Moisture gauge', 'input'),
  moisturePercent: percent('Moisture', 'moisturecontent', 'mc', 'w', 'watercontent', 'moist'),
  oversizePercent: percent('Oversize', 'oversizefraction', 'rock', 'coarse', 'oversizeshare'),
  remarks: text('Remarks', 'input', 'comments', 'comment', 'notes', 'note', 'remark'),
  technician: text('Technician', 'result'),
  recordedAt: { label: 'Recorded at', role: 'result', kind: 'instant' },
  material: result('Material'),
  outcome: result('Result'),
  headline: result('Verdict'),
  rc: result('Compaction', '%', 1),
  resultWet: { label: 'Result, wet density', role: 'result', kind: 'number', group: 'density', decimals: 1 },
  resultDry: { label: 'Result, dry density', role: 'result', kind: 'number', group: 'density', decimals: 1 },
  resultMoisture: result('Result, moisture', '%', 1),
  moistureDeviation: result('Moisture from optimum', '%', 1),
  maxDryDensity: { label: 'Maximum dry density used', role: 'result', kind: 'number', group: 'density', decimals: 1 },
  optimum: result('Optimum moisture used', '%', 1),
  saturation: result('Saturation', '%', 1),
  airVoids: result('Air voids', '%', 1),
  flags: result('Flags'),
  voidedAt: { label: 'Voided at', role: 'fallback', kind: 'instant' },
  voidReason: text('Void because', 'fallback'),
} as const satisfies Record<string, TestColumn>

export type ColumnKey = keyof typeof TEST_COLUMNS
export const COLUMN_KEYS = Object.keys(TEST_COLUMNS) as readonly ColumnKey[]

/** The column, by its key, with everything it may have. */
export function columnOf(key: ColumnKey): TestColumn {
  return TEST_COLUMNS[key]
}

/** The column beside a group's readings that says their unit; place, elevation and depth have theirs in the head. */
export const UNIT_COLUMN: Readonly<Partial<Record<UnitGroup, ColumnKey>>> = { mass: 'massUnit', density: 'densityUnit', volume: 'volumeUnit', length: 'lengthUnit', tin: 'tinUnit', water: 'waterUnit' }

/** What a file may be read for: everything but results. */
export const READABLE_KEYS = COLUMN_KEYS.filter((key) => columnOf(key).role !== 'result')

/** What together makes the test again; equal here is equal on record. */
export const INPUT_KEYS = COLUMN_KEYS.filter((key) => columnOf(key).role === 'input')

/** One row of a file by column, as text: what stands in a cell. */
export type RowCells = Readonly<Partial<Record<ColumnKey, string>>>

/** One row to be written: text, or a number; an instant as ISO-8601 text with its offset. */
export type RowValues = Readonly<Partial<Record<ColumnKey, string | number>>>
