import { MOISTURE_WORDS, METHOD_WORDS } from '#web/features/tests/outcome-words.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { THIN_SPACE } from '#shared/units/format.ts'
import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'

export interface SheetRow {
  readonly label: string
  readonly value: string
}
export interface SheetPart {
  readonly title: string
  readonly aside: string
  readonly rows: readonly SheetRow[]
}

/** A reading as it was recorded: every digit, none added. */
export function asRecorded(value: number, unit?: string): string {
  const text = value.toLocaleString('en-US', { maximumFractionDigits: 10 })
  return unit === undefined ? text : `${text}${THIN_SPACE}${unit}`
}

type Sheet = TestDetail['sheet']

/** The raw sheet, part by part, in the units it was read in. */
export function sheetParts(sheet: Sheet, gauge: TestDetail['gauge'] = null): SheetPart[] {
  const gaugeRows = gauge === null ? [] : [{ label: 'Gauge', value: gauge.serial ?? 'not named' }]
  return [{ title: METHOD_WORDS[sheet.method].name, aside: METHOD_WORDS[sheet.method].standard, rows: [...gaugeRows, ...densityRows(sheet)] }, moisturePart(sheet.moisture)]
}

const given = (label: string, value: number | undefined, unit?: string): SheetRow[] => (value === undefined ? [] : [{ label, value: asRecorded(value, unit) }])

function densityRows(sheet: Sheet): SheetRow[] {
  const density = 'densityUnit' in sheet ? DENSITY_UNIT_LABEL[sheet.densityUnit] : undefined
  switch (sheet.method) {
    case 'sand-cone':
      return [
        ...given('Apparatus and sand before', sheet.apparatusBefore, sheet.massUnit),
        ...given('Apparatus and sand after', sheet.apparatusAfter, sheet.massUnit),
        ...given('Sand in cone and plate', sheet.coneAndPlate, sheet.massUnit),
        ...given('Bulk density of sand', sheet.sandDensity, density),
        ...given('Moist soil from hole', sheet.moistSoil, sheet.massUnit),
        ...given('Largest particle', sheet.largestParticle, sheet.lengthUnit),
      ]
    case 'rubber-balloon':
      return [
        ...given('Indicator on the plate', sheet.volumeBefore, VOLUME_UNIT_LABEL[sheet.volumeUnit]),
        ...given('Indicator in the hole', sheet.volumeAfter, VOLUME_UNIT_LABEL[sheet.volumeUnit]),
        ...given('Moist soil from hole', sheet.moistSoil, sheet.massUnit),
        ...given('Largest particle', sheet.largestParticle, sheet.lengthUnit),
      ]
    case 'drive-cylinder':
      return [
        ...given('Cylinder and soil', sheet.cylinderAndSoil, sheet.massUnit),
        ...given('Cylinder, empty', sheet.cylinder, sheet.massUnit),
        ...given('Volume of the cylinder', sheet.volume, VOLUME_UNIT_LABEL[sheet.volumeUnit]),
        ...given('Inner diameter', sheet.diameter, sheet.lengthUnit),
        ...given('Height', sheet.height, sheet.lengthUnit),
        ...given('Largest particle', sheet.largestParticle, sheet.lengthUnit),
      ]
    case 'nuclear-gauge':
      return [
        { label: 'Mode', value: sheet.mode === 'backscatter' ? 'Backscatter' : 'Direct transmission' },
        ...given('Rod depth', sheet.rodDepth, sheet.lengthUnit),
        ...given('Wet density', sheet.wetDensity, density),
        ...given('Wet density, turned', sheet.secondWetDensity, density),
        ...given('Density count', sheet.standardCounts?.density),
        ...given('Its reference', sheet.standardCounts?.referenceDensity),
        ...given('Moisture count', sheet.standardCounts?.moisture),
        ...given('Its reference, moisture', sheet.standardCounts?.referenceMoisture),
      ]
    case 'plain':
      return given(sheet.densityIs === 'dry' ? 'Dry density' : 'Wet density', sheet.density, density)
  }
}

/** The correction beside a wall with the sign it was written in. */
function wallRows({ wall, densityUnit }: Extract<Sheet['moisture'], { method: 'gauge' }>): SheetRow[] {
  if (wall === undefined) return []
  const byGauge = wall.appliedBy === 'gauge'
  return [
    { label: byGauge ? 'Wall offset, stored in the gauge' : 'Wall offset, applied here', value: asRecorded(wall.offset, byGauge ? 'counts' : DENSITY_UNIT_LABEL[densityUnit]) },
    { label: 'Sign of the offset', value: wall.convention === 'block-minus-standard' ? 'block − standard, subtracted' : 'standard − block, added' },
  ]
}

function moisturePart(sheet: Sheet['moisture']): SheetPart {
  const { name, standard } = MOISTURE_WORDS[sheet.method]
  const part = (rows: SheetRow[]): SheetPart => ({ title: 'Moisture', aside: `${name}, ${standard}`, rows })
  switch (sheet.method) {
    case 'oven':
    case 'microwave':
      return part([...given('Wet soil and tin', sheet.wetAndTin, sheet.massUnit), ...(sheet.earlier ?? []).flatMap((mass, i) => given(`Weighing ${i + 1}`, mass, sheet.massUnit)), ...given('Dry soil and tin', sheet.dryAndTin, sheet.massUnit), ...given('Tin', sheet.tin, sheet.massUnit)])
    case 'carbide':
      return part(given('Dial, of wet mass', sheet.readingPercent, '%'))
    case 'gauge':
      return part([...given('Moisture density', sheet.moistureDensity, DENSITY_UNIT_LABEL[sheet.densityUnit]), ...given('Site correction K', sheet.correctionK), ...wallRows(sheet)])
    case 'stated':
      return part(given('Moisture of dry mass', sheet.percent, '%'))
  }
}
