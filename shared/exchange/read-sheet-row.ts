import type { FieldMethod, MoistureSheet, RawSheet } from '#shared/domain/field-sheets.ts'
import type { WallOffset } from '#shared/domain/wall-offset.ts'
import { APPLIED_WORDS, CONVENTION_WORDS, METHOD_WORDS, MODE_WORDS, MOISTURE_WORDS, VOLUME_BY_WORDS } from '#shared/exchange/exchange-words.ts'
import { readNumber } from '#shared/exchange/read-number.ts'
import type { RowReader } from '#shared/exchange/row-reader.ts'
import type { ColumnKey } from '#shared/exchange/test-columns.ts'

/** Cells of the field sheet: those a method has no use for must be empty, lest a reading gets lost. */
const SHEET_KEYS: readonly ColumnKey[] = [
  ...(['apparatusBefore', 'apparatusAfter', 'coneAndPlate', 'sandDensity', 'volumeBefore', 'volumeAfter', 'moistSoil', 'cylinderAndSoil', 'cylinder', 'volumeBy', 'cylinderVolume', 'cylinderDiameter', 'cylinderHeight'] as const),
  ...(['largestParticle', 'calibrations', 'gauge', 'gaugeMode', 'rodDepth', 'wetDensity', 'secondWetDensity', 'dryDensity', 'standardDensity', 'standardMoisture', 'referenceDensity', 'referenceMoisture'] as const),
  ...(['wetAndTin', 'dryAndTin', 'tin', 'earlier', 'carbideReading', 'moistureDensity', 'correctionK', 'wallAppliedBy', 'wallConvention', 'wallOffset', 'moistureGauge', 'moisturePercent'] as const),
]

/** The field sheet of a row, or undefined where its method is not known; what is wrong stands with the reader. */
export function readSheetRow(row: RowReader): RawSheet | undefined {
  const method = row.choice('method', METHOD_WORDS)
  const moisture = readMoisture(row)
  if (method === undefined || moisture === undefined) return undefined
  const sheet = readMethod(row, method, moisture)
  for (const key of ['gauge', 'moistureGauge', 'calibrations'] as const) if (hasPlaceFor(key, sheet)) row.text(key)
  for (const key of row.leftOver(SHEET_KEYS)) row.fail(key, `${METHOD_WORDS[method]} with moisture by ${MOISTURE_WORDS[moisture.method].toLowerCase()} has no such reading. Clear it, or correct the method.`)
  return sheet
}

function hasPlaceFor(key: 'gauge' | 'moistureGauge' | 'calibrations', { method, moisture }: RawSheet): boolean {
  if (key === 'gauge') return method === 'nuclear-gauge' || moisture.method === 'gauge'
  return key === 'moistureGauge' ? moisture.method === 'gauge' : method === 'sand-cone' || method === 'rubber-balloon' || method === 'drive-cylinder'
}

/** A key only where the cell holds something, as the sheet itself leaves it out. */
function given<K extends string>(name: K, value: number | undefined): Partial<Record<K, number>> {
  return value === undefined ? {} : ({ [name]: value } as Partial<Record<K, number>>)
}

function readMethod(row: RowReader, method: FieldMethod, moisture: MoistureSheet): RawSheet {
  switch (method) {
    case 'sand-cone': {
      const seen = given('largestParticle', row.optional('largestParticle'))
      const massUnit = row.unit<'g'>('mass', ['apparatusBefore', 'apparatusAfter', 'coneAndPlate', 'moistSoil'])
      const lengthUnit = row.has('largestParticle') || row.has('lengthUnit') ? { lengthUnit: row.unit<'mm'>('length', ['largestParticle']) } : {}
      const masses = { massUnit, apparatusBefore: row.number('apparatusBefore'), apparatusAfter: row.number('apparatusAfter'), coneAndPlate: row.number('coneAndPlate') }
      return { method, ...masses, densityUnit: row.unit<'pcf'>('density', ['sandDensity']), sandDensity: row.number('sandDensity'), moistSoil: row.number('moistSoil'), ...seen, ...lengthUnit, moisture }
    }
    case 'rubber-balloon': {
      const volumes = { volumeUnit: row.unit<'cm3'>('volume', ['volumeBefore', 'volumeAfter']), volumeBefore: row.number('volumeBefore'), volumeAfter: row.number('volumeAfter') }
      const lengthUnit = row.unit<'mm'>('length', ['largestParticle'])
      return { method, ...volumes, massUnit: row.unit<'g'>('mass', ['moistSoil']), moistSoil: row.number('moistSoil'), ...given('largestParticle', row.optional('largestParticle')), lengthUnit, moisture }
    }
    case 'drive-cylinder':
      return readCylinder(row, moisture)
    case 'nuclear-gauge':
      return readGauge(row, moisture)
    case 'plain':
      return readPlain(row, moisture)
  }
}

function readCylinder(row: RowReader, moisture: MoistureSheet): RawSheet {
  const measured = row.has('cylinderDiameter') || row.has('cylinderHeight')
  const volumeBy = row.choice('volumeBy', VOLUME_BY_WORDS, measured && !row.has('cylinderVolume') ? 'measured' : 'stated') ?? 'stated'
  const size = { ...given('volume', row.optional('cylinderVolume')), ...given('diameter', row.optional('cylinderDiameter')), ...given('height', row.optional('cylinderHeight')) }
  return {
    method: 'drive-cylinder',
    massUnit: row.unit<'g'>('mass', ['cylinderAndSoil', 'cylinder']),
    cylinderAndSoil: row.number('cylinderAndSoil'),
    cylinder: row.number('cylinder'),
    volumeBy,
    volumeUnit: row.unit<'cm3'>('volume', ['cylinderVolume']),
    ...size,
    lengthUnit: row.unit<'mm'>('length', ['cylinderDiameter', 'cylinderHeight', 'largestParticle']),
    ...given('largestParticle', row.optional('largestParticle')),
    moisture,
  }
}

function readGauge(row: RowReader, moisture: MoistureSheet): RawSheet {
  const mode = row.choice('gaugeMode', MODE_WORDS, 'direct-transmission') ?? 'direct-transmission'
  const density = row.optional('standardDensity')
  const count = row.optional('standardMoisture')
  const references = { ...given('referenceDensity', row.optional('referenceDensity')), ...given('referenceMoisture', row.optional('referenceMoisture')) }
  if ((density === undefined) !== (count === undefined)) row.fail(density === undefined ? 'standardDensity' : 'standardMoisture', 'A standard count has both figures, density and moisture.')
  if (density === undefined && Object.keys(references).length > 0) row.fail('standardDensity', 'Give the standard count that the reference belongs to.')
  return {
    method: 'nuclear-gauge',
    mode,
    lengthUnit: row.unit<'mm'>('length', ['rodDepth']),
    rodDepth: mode === 'backscatter' && !row.has('rodDepth') ? 0 : row.number('rodDepth'),
    densityUnit: row.unit<'pcf'>('density', ['wetDensity', 'secondWetDensity']),
    wetDensity: row.number('wetDensity'),
    ...given('secondWetDensity', row.optional('secondWetDensity')),
    ...(density === undefined || count === undefined ? {} : { standardCounts: { density, moisture: count, ...references } }),
    moisture,
  }
}

function readPlain(row: RowReader, moisture: MoistureSheet): RawSheet {
  const [wet, dry] = [row.has('wetDensity'), row.has('dryDensity')]
  if (wet && dry) row.fail('wetDensity', 'A plain sheet takes the wet density or the dry density, not both. Clear the one that was worked out.')
  row.text('wetDensity')
  const key = wet && !dry ? 'wetDensity' : 'dryDensity'
  return { method: 'plain', densityUnit: row.unit<'pcf'>('density', [key]), densityIs: key === 'wetDensity' ? 'wet' : 'dry', density: row.number(key), moisture }
}

/** Which cell of each moisture method tells that it was used, where the file does not say it. */
const TELLING = { oven: 'wetAndTin', carbide: 'carbideReading', gauge: 'moistureDensity', stated: 'moisturePercent' } as const satisfies Partial<Record<MoistureSheet['method'], ColumnKey>>

function readMoisture(row: RowReader): MoistureSheet | undefined {
  const told = (Object.keys(TELLING) as (keyof typeof TELLING)[]).filter((method) => row.has(TELLING[method]))
  const method = row.choice('moistureMethod', MOISTURE_WORDS, told.length === 1 ? told[0] : undefined)
  switch (method) {
    case undefined:
      return undefined
    case 'oven':
    case 'microwave': {
      const massUnit = row.unit<'g'>('tin', ['wetAndTin', 'dryAndTin', 'tin', 'earlier'])
      return { method, massUnit, wetAndTin: row.number('wetAndTin'), dryAndTin: row.number('dryAndTin'), tin: row.number('tin'), ...readEarlier(row) }
    }
    case 'carbide':
      return { method, readingPercent: row.number('carbideReading') }
    case 'stated':
      return { method, percent: row.number('moisturePercent') }
    case 'gauge': {
      const densityUnit = row.unit<'pcf'>('water', ['moistureDensity', 'wallOffset'])
      return { method, densityUnit, moistureDensity: row.number('moistureDensity'), correctionK: row.optional('correctionK') ?? 0, ...readWall(row) }
    }
  }
}

function readEarlier(row: RowReader): { earlier?: number[] } {
  const texts = row.text('earlier').split(/[\s;]+/).filter((text) => text !== '')
  if (texts.length === 0) return {}
  const values = texts.map((text) => readNumber(text, row.options.decimal))
  if (values.includes(undefined)) row.fail('earlier', 'Write the earlier weighings with blanks between them, oldest first: 197.4 196.8.')
  return { earlier: values.map((value) => value ?? Number.NaN) }
}

function readWall(row: RowReader): { wall?: WallOffset } {
  if (!row.has('wallOffset') && !row.has('wallAppliedBy') && !row.has('wallConvention')) return {}
  const appliedBy = row.choice('wallAppliedBy', APPLIED_WORDS)
  const convention = row.choice('wallConvention', CONVENTION_WORDS)
  const offset = row.number('wallOffset')
  return appliedBy === undefined || convention === undefined ? {} : { wall: { appliedBy, convention, offset } }
}
