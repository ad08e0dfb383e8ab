import type { CreateTest } from '#shared/schemas/field-test.ts'
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
export const SECTION = { 'sand-cone': 'sandCone', 'nuclear-gauge': 'gauge', plain: 'plain' } as const

/** The field sheet as typed. */
export function readSheet(form: TestForm): RawSheet {
  const moisture = readMoisture(form.moisture)
  switch (form.method) {
    case 'sand-cone': {
      const { massUnit, densityUnit, lengthUnit, ...typed } = form.sandCone
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
        moisture,
      }
    }
    case 'nuclear-gauge':
      return readGauge(form.gauge, moisture)
    case 'plain':
      return { method: 'plain', densityUnit: form.plain.densityUnit, densityIs: form.plain.densityIs, density: reading(form.plain.density), moisture }
  }
}

function readGauge({ mode, lengthUnit, densityUnit, ...typed }: TestForm['gauge'], moisture: MoistureSheet): RawSheet {
  const second = optional(typed.secondWetDensity)
  const { density, moisture: moistureCount, referenceDensity, referenceMoisture } = typed.standardCounts
  const [densityReference, moistureReference] = [optional(referenceDensity), optional(referenceMoisture)]
  const counted = [density, moistureCount, referenceDensity, referenceMoisture].some((text) => text.trim() !== '')
  return {
    method: 'nuclear-gauge',
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

function readMoisture(typed: TestForm['moisture']): MoistureSheet {
  switch (typed.method) {
    case 'oven':
    case 'microwave':
      return { method: typed.method, massUnit: typed.massUnit, wetAndTin: reading(typed.wetAndTin), dryAndTin: reading(typed.dryAndTin), tin: reading(typed.tin) }
    case 'carbide':
      return { method: 'carbide', readingPercent: reading(typed.readingPercent) }
    case 'gauge':
      return { method: 'gauge', densityUnit: typed.densityUnit, moistureDensity: reading(typed.moistureDensity), correctionK: reading(typed.correctionK) }
    case 'stated':
      return { method: 'stated', percent: reading(typed.percent) }
  }
}

/** True when every number of a sheet is one: then it can be sent. */
export function isFinite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value)
  return typeof value !== 'object' || value === null || Object.values(value).every(isFinite)
}

/** The form's field that a sheet's field is typed in. */
export function formField(method: TestForm['method'], field: string): string {
  return field.startsWith('moisture.') ? field : `${SECTION[method]}.${field}`
}

/** The text typed at a path of the form. */
export function textAt(form: TestForm, path: string): string {
  let value: unknown = form
  for (const step of path.split('.')) value = typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[step] : undefined
  return typeof value === 'string' ? value : ''
}
