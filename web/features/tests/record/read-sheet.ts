import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { WallOffset } from '#shared/domain/wall-offset.ts'
import { parseNumber } from '#web/lib/units.ts'
import type { TestForm } from './test-form.ts'

type RawSheet = CreateTest['sheet']
type MoistureSheet = RawSheet['moisture']

/** A reading as a number; what is empty or unreadable is NaN, which the reduction names as missing. */
export function reading(text: string): number {
  const typed = parseNumber(text)
  return typed.ok ? typed.value : NaN
}

/** A reading that may be left out: undefined when nothing is typed. */
function optional(text: string): number | undefined {
  return text.trim() === '' ? undefined : reading(text)
}

/** The part of the form that a method's readings stand in. */
export const SECTION = { 'sand-cone': 'sandCone', 'rubber-balloon': 'balloon', 'drive-cylinder': 'cylinder', 'nuclear-gauge': 'gauge', plain: 'plain' } as const

/** The field sheet as typed. */
export function readSheet(form: TestForm): RawSheet {
  const moisture = readMoisture(form)
  switch (form.method) {
    case 'sand-cone': {
      const { massUnit, densityUnit, lengthUnit, sandId, coneId, ...typed } = form.sandCone
      const largestParticle = optional(typed.largestParticle)
      return {
        method: 'sand-cone',
        massUnit,
        apparatusBefore: reading(typed.apparatusBefore),
        apparatusAfter: reading(typed.apparatusAfter),
        coneAndPlate: reading(typed.coneAndPlate),
        densityUnit,
        sandDensity: reading(typed.sandDensity),
        moistSoil: reading(typed.moistSoil),
        ...(largestParticle === undefined ? {} : { largestParticle, lengthUnit }),
        ...calibrated(sandId, coneId),
        moisture,
      }
    }
    case 'rubber-balloon':
      return readBalloon(form.balloon, moisture)
    case 'drive-cylinder':
      return readCylinder(form.cylinder, moisture)
    case 'nuclear-gauge':
      return readGauge(form.gauge, moisture)
    case 'plain':
      return { method: 'plain', densityUnit: form.plain.densityUnit, densityIs: form.plain.densityIs, density: reading(form.plain.density), moisture }
  }
}

function calibrated(...ids: readonly string[]): { calibrationIds?: string[] } {
  const used = ids.filter((id) => id !== '')
  return used.length === 0 ? {} : { calibrationIds: used }
}

function readBalloon({ volumeUnit, massUnit, lengthUnit, balloonId, ...typed }: TestForm['balloon'], moisture: MoistureSheet): RawSheet {
  const largestParticle = optional(typed.largestParticle)
  return {
    method: 'rubber-balloon',
    volumeUnit,
    volumeBefore: reading(typed.volumeBefore),
    volumeAfter: reading(typed.volumeAfter),
    massUnit,
    moistSoil: reading(typed.moistSoil),
    ...(largestParticle === undefined ? {} : { largestParticle }),
    lengthUnit,
    ...calibrated(balloonId),
    moisture,
  }
}

function readCylinder({ massUnit, volumeBy, volumeUnit, lengthUnit, cylinderId, ...typed }: TestForm['cylinder'], moisture: MoistureSheet): RawSheet {
  const largestParticle = optional(typed.largestParticle)
  const size = volumeBy === 'stated' ? { volume: reading(typed.volume) } : { diameter: reading(typed.diameter), height: reading(typed.height) }
  return {
    method: 'drive-cylinder',
    massUnit,
    cylinderAndSoil: reading(typed.cylinderAndSoil),
    cylinder: reading(typed.cylinder),
    volumeBy,
    volumeUnit,
    ...size,
    lengthUnit,
    ...(largestParticle === undefined ? {} : { largestParticle }),
    ...(volumeBy === 'stated' ? calibrated(cylinderId) : {}),
    moisture,
  }
}

/** The weighings before the last, as they are kept in the form. */
export function earlierWeighings(text: string): number[] {
  return text.split(' ').filter((mass) => mass !== '').map(reading)
}

function readGauge({ gaugeId, mode, lengthUnit, densityUnit, ...typed }: TestForm['gauge'], moisture: MoistureSheet): RawSheet {
  const second = optional(typed.secondWetDensity)
  const { density, moisture: moistureCount, referenceDensity, referenceMoisture } = typed.standardCounts
  const [densityReference, moistureReference] = [optional(referenceDensity), optional(referenceMoisture)]
  // the counts of a registered gauge stand in its register
  const counted = gaugeId === '' && [density, moistureCount, referenceDensity, referenceMoisture].some((text) => text.trim() !== '')
  return {
    method: 'nuclear-gauge',
    ...(gaugeId === '' ? {} : { gaugeId }),
    mode,
    lengthUnit,
    rodDepth: mode === 'backscatter' ? 0 : reading(typed.rodDepth),
    densityUnit,
    wetDensity: reading(typed.wetDensity),
    ...(second === undefined ? {} : { secondWetDensity: second }),
    ...(counted
      ? {
          standardCounts: {
            density: reading(density),
            moisture: reading(moistureCount),
            ...(densityReference === undefined ? {} : { referenceDensity: densityReference }),
            ...(moistureReference === undefined ? {} : { referenceMoisture: moistureReference }),
          },
        }
      : {}),
    moisture,
  }
}

function readMoisture({ method, gauge, moisture: typed }: TestForm): MoistureSheet {
  switch (typed.method) {
    case 'oven':
    case 'microwave': {
      const earlier = typed.method === 'microwave' ? earlierWeighings(typed.earlier) : []
      const weighed = { massUnit: typed.massUnit, wetAndTin: reading(typed.wetAndTin), dryAndTin: reading(typed.dryAndTin), tin: reading(typed.tin) }
      return { method: typed.method, ...weighed, ...(earlier.length === 0 ? {} : { earlier }) }
    }
    case 'carbide':
      return { method: 'carbide', readingPercent: reading(typed.readingPercent) }
    case 'gauge':
      return {
        method: 'gauge',
        densityUnit: typed.densityUnit,
        moistureDensity: reading(typed.moistureDensity),
        correctionK: reading(typed.correctionK),
        ...readWall(typed.wall),
        // a sheet read with a gauge names it itself
        ...(method === 'nuclear-gauge' || gauge.gaugeId === '' ? {} : { gaugeId: gauge.gaugeId }),
      }
    case 'stated':
      return { method: 'stated', percent: reading(typed.percent) }
  }
}

/** Without a sign chosen there is no correction yet; the form asks for it. */
function readWall({ by, convention, offset }: TestForm['moisture']['wall']): { wall?: WallOffset } {
  return by === '' || convention === '' ? {} : { wall: { appliedBy: by, convention, offset: reading(offset) } }
}

/** True when every number of a sheet is one: then it can be sent. */
export function isFinite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value)
  return typeof value !== 'object' || value === null || Object.values(value).every(isFinite)
}

/** Where what is wrong with a calibration is said. */
const CALIBRATION_FIELD: Partial<Record<TestForm['method'], string>> = { 'sand-cone': 'sandCone.sandId', 'rubber-balloon': 'balloon.balloonId', 'drive-cylinder': 'cylinder.cylinderId' }

/** The form's field that a sheet's field is typed in. */
export function formField(method: TestForm['method'], field: string): string {
  if (field === 'moisture.gaugeId') return 'gauge.gaugeId'
  if (field.startsWith('moisture.earlier')) return 'moisture.dryAndTin'
  if (field.startsWith('calibrationIds')) return CALIBRATION_FIELD[method] ?? SECTION[method]
  return field.startsWith('moisture.') ? field : `${SECTION[method]}.${field}`
}

/** The text typed at a path of the form. */
export function textAt(form: TestForm, path: string): string {
  let value: unknown = form
  for (const step of path.split('.')) value = typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[step] : undefined
  return typeof value === 'string' ? value : ''
}
