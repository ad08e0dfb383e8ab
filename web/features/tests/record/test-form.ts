import type { FieldMethod, MoistureMethod, NuclearGaugeSheet } from '#shared/domain/field-sheets.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import type { UnitSystem } from '#shared/units/format.ts'

/** Lengths on a field sheet: rod depths and particles. */
export type SheetLengthUnit = 'in' | 'mm' | 'cm'

/** How the place of a test is said. */
export type PlaceBy = 'stake' | 'cell' | 'point'

/** Everything typed on the sheet, as text: what cannot be read yet is kept as it stands. */
export interface TestForm {
  /** given when the form opens, so that sending it twice saves it once */
  id: string
  openedAt: string
  purpose: Purpose | ''
  placeBy: PlaceBy
  stakeId: string
  cell: string
  easting: string
  northing: string
  lift: string
  method: FieldMethod
  sandCone: {
    massUnit: MassUnit
    densityUnit: DensityUnit
    lengthUnit: SheetLengthUnit
    apparatusBefore: string
    apparatusAfter: string
    coneAndPlate: string
    sandDensity: string
    moistSoil: string
    largestParticle: string
  }
  gauge: {
    mode: NuclearGaugeSheet['mode']
    densityUnit: DensityUnit
    lengthUnit: SheetLengthUnit
    rodDepth: string
    wetDensity: string
    secondWetDensity: string
    standardCounts: { density: string; moisture: string; referenceDensity: string; referenceMoisture: string }
  }
  plain: { densityUnit: DensityUnit; densityIs: 'wet' | 'dry'; density: string }
  moisture: {
    method: MoistureMethod
    massUnit: MassUnit
    densityUnit: DensityUnit
    wetAndTin: string
    dryAndTin: string
    tin: string
    readingPercent: string
    moistureDensity: string
    correctionK: string
    percent: string
  }
  curveId: string
  oversize: string
  depth: string
  elevation: string
  sampledAt: string
  remarks: string
}

/** What a technician chose last time, kept for the next test. */
export interface Habits {
  readonly method?: FieldMethod | undefined
  readonly byMethod?: Partial<Record<FieldMethod, Partial<MethodHabits>>> | undefined
}
export interface MethodHabits {
  readonly massUnit: MassUnit
  readonly densityUnit: DensityUnit
  readonly lengthUnit: SheetLengthUnit
  readonly moistureMethod: MoistureMethod
  readonly moistureMassUnit: MassUnit
}

const BLANK_MOISTURE = { wetAndTin: '', dryAndTin: '', tin: '', readingPercent: '', moistureDensity: '', correctionK: '0', percent: '' } as const

/** An empty sheet in the units the technician used last, or those of the site. */
export function emptyForm(start: Pick<TestForm, 'id' | 'openedAt' | 'sampledAt'>, system: UnitSystem, habits: Habits = {}): TestForm {
  const used = habits.byMethod ?? {}
  const us = system === 'us'
  const method = habits.method ?? 'sand-cone'
  const form: TestForm = {
    ...start,
    purpose: '',
    placeBy: 'cell',
    stakeId: '',
    cell: '',
    easting: '',
    northing: '',
    lift: '',
    method,
    sandCone: {
      massUnit: used['sand-cone']?.massUnit ?? 'g',
      densityUnit: used['sand-cone']?.densityUnit ?? 'g/cm3',
      lengthUnit: used['sand-cone']?.lengthUnit ?? (us ? 'in' : 'mm'),
      apparatusBefore: '',
      apparatusAfter: '',
      coneAndPlate: '',
      sandDensity: '',
      moistSoil: '',
      largestParticle: '',
    },
    gauge: {
      mode: 'direct-transmission',
      densityUnit: used['nuclear-gauge']?.densityUnit ?? (us ? 'pcf' : 'kg/m3'),
      lengthUnit: used['nuclear-gauge']?.lengthUnit ?? (us ? 'in' : 'mm'),
      rodDepth: '',
      wetDensity: '',
      secondWetDensity: '',
      standardCounts: { density: '', moisture: '', referenceDensity: '', referenceMoisture: '' },
    },
    plain: { densityUnit: used.plain?.densityUnit ?? (us ? 'pcf' : 'kN/m3'), densityIs: 'dry', density: '' },
    moisture: { ...BLANK_MOISTURE, method: 'oven', massUnit: 'g', densityUnit: us ? 'pcf' : 'kg/m3' },
    curveId: '',
    oversize: '',
    depth: '',
    elevation: '',
    remarks: '',
  }
  return { ...form, moisture: { ...form.moisture, ...moistureHabits(method, habits) } }
}

const USUAL_MOISTURE: Readonly<Record<FieldMethod, MoistureMethod>> = { 'sand-cone': 'microwave', 'nuclear-gauge': 'gauge', plain: 'stated' }

/** How moisture was taken the last time with a method, or as is usual with it. */
export function moistureHabits(method: FieldMethod, habits: Habits): Pick<TestForm['moisture'], 'method' | 'massUnit'> {
  const used = habits.byMethod?.[method]
  return { method: used?.moistureMethod ?? USUAL_MOISTURE[method], massUnit: used?.moistureMassUnit ?? 'g' }
}

/** What to remember of a sheet. */
export function habitsOf({ method, sandCone, gauge, plain, moisture }: TestForm): MethodHabits {
  const units = method === 'sand-cone' ? sandCone : method === 'nuclear-gauge' ? { massUnit: 'g' as const, ...gauge } : { massUnit: 'g' as const, lengthUnit: 'in' as const, ...plain }
  return { massUnit: units.massUnit, densityUnit: units.densityUnit, lengthUnit: units.lengthUnit, moistureMethod: moisture.method, moistureMassUnit: moisture.massUnit }
}
