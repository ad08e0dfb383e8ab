import type { CalibrationKind } from '#shared/domain/calibration.ts'
import type { DriveCylinderSheet, FieldMethod, MoistureMethod, NuclearGaugeSheet } from '#shared/domain/field-sheets.ts'
import type { WallOffset } from '#shared/domain/wall-offset.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import type { UnitSystem } from '#shared/units/format.ts'

/** Lengths on a field sheet: rod depths and particles. */
export type SheetLengthUnit = 'in' | 'mm' | 'cm'

/** Volumes on a field sheet: indicator readings and cylinders. */
export type SheetVolumeUnit = 'cm3' | 'in3' | 'ft3'

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
    /** the calibrations its sand and cone stand by, '' where they were typed */
    sandId: string
    coneId: string
  }
  balloon: {
    volumeUnit: SheetVolumeUnit
    massUnit: MassUnit
    lengthUnit: SheetLengthUnit
    volumeBefore: string
    volumeAfter: string
    moistSoil: string
    largestParticle: string
    balloonId: string
  }
  cylinder: {
    massUnit: MassUnit
    volumeBy: DriveCylinderSheet['volumeBy']
    volumeUnit: SheetVolumeUnit
    lengthUnit: SheetLengthUnit
    cylinderAndSoil: string
    cylinder: string
    volume: string
    diameter: string
    height: string
    largestParticle: string
    cylinderId: string
  }
  gauge: {
    /** the gauge of the register, '' where none is named */
    gaugeId: string
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
    /** weighings of a microwaved tin before the last, oldest first, a space between */
    earlier: string
    readingPercent: string
    moistureDensity: string
    correctionK: string
    /** beside a wall: who corrects the reading ('' where nothing does), how the offset is signed, the offset */
    wall: { by: '' | WallOffset['appliedBy']; convention: '' | WallOffset['convention']; offset: string }
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
  readonly massUnit?: MassUnit | undefined
  readonly densityUnit?: DensityUnit | undefined
  readonly lengthUnit?: SheetLengthUnit | undefined
  readonly volumeUnit?: SheetVolumeUnit | undefined
  readonly moistureMethod: MoistureMethod
  readonly moistureMassUnit: MassUnit
  /** calibrations used last, by kind; offered again while they are in force */
  readonly calibrations?: Partial<Record<CalibrationKind, string>> | undefined
  /** gauge used last; offered again where the site's register has it */
  readonly gaugeId?: string | undefined
}

const BLANK_MOISTURE = { wetAndTin: '', dryAndTin: '', tin: '', earlier: '', readingPercent: '', moistureDensity: '', correctionK: '0', wall: { by: '', convention: '', offset: '' }, percent: '' } as const

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
      sandId: used['sand-cone']?.calibrations?.['sand-density'] ?? '',
      coneId: used['sand-cone']?.calibrations?.cone ?? '',
    },
    balloon: {
      volumeUnit: used['rubber-balloon']?.volumeUnit ?? 'cm3',
      massUnit: used['rubber-balloon']?.massUnit ?? 'g',
      lengthUnit: used['rubber-balloon']?.lengthUnit ?? (us ? 'in' : 'mm'),
      volumeBefore: '',
      volumeAfter: '',
      moistSoil: '',
      largestParticle: '',
      balloonId: used['rubber-balloon']?.calibrations?.balloon ?? '',
    },
    cylinder: {
      massUnit: used['drive-cylinder']?.massUnit ?? 'g',
      volumeBy: 'stated',
      volumeUnit: used['drive-cylinder']?.volumeUnit ?? 'cm3',
      lengthUnit: used['drive-cylinder']?.lengthUnit ?? (us ? 'in' : 'mm'),
      cylinderAndSoil: '',
      cylinder: '',
      volume: '',
      diameter: '',
      height: '',
      largestParticle: '',
      cylinderId: used['drive-cylinder']?.calibrations?.cylinder ?? '',
    },
    gauge: {
      gaugeId: used['nuclear-gauge']?.gaugeId ?? '',
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

const USUAL_MOISTURE: Readonly<Record<FieldMethod, MoistureMethod>> = {
  'sand-cone': 'microwave',
  'rubber-balloon': 'microwave',
  'drive-cylinder': 'oven',
  'nuclear-gauge': 'gauge',
  plain: 'stated',
}

/** How moisture was taken the last time with a method, or as is usual with it. */
export function moistureHabits(method: FieldMethod, habits: Habits): Pick<TestForm['moisture'], 'method' | 'massUnit'> {
  const used = habits.byMethod?.[method]
  return { method: used?.moistureMethod ?? USUAL_MOISTURE[method], massUnit: used?.moistureMassUnit ?? 'g' }
}

/** What to remember of a sheet. */
export function habitsOf(form: TestForm): MethodHabits {
  const { moisture } = form
  return { ...unitsOf(form), moistureMethod: moisture.method, moistureMassUnit: moisture.massUnit }
}

function unitsOf({ method, sandCone, balloon, cylinder, gauge, plain }: TestForm): Omit<MethodHabits, 'moistureMethod' | 'moistureMassUnit'> {
  switch (method) {
    case 'sand-cone': {
      const { massUnit, densityUnit, lengthUnit, sandId, coneId } = sandCone
      return { massUnit, densityUnit, lengthUnit, calibrations: { 'sand-density': sandId, cone: coneId } }
    }
    case 'rubber-balloon': {
      const { massUnit, volumeUnit, lengthUnit, balloonId } = balloon
      return { massUnit, volumeUnit, lengthUnit, calibrations: { balloon: balloonId } }
    }
    case 'drive-cylinder': {
      const { massUnit, volumeUnit, lengthUnit, cylinderId } = cylinder
      return { massUnit, volumeUnit, lengthUnit, calibrations: { cylinder: cylinderId } }
    }
    case 'nuclear-gauge':
      return { densityUnit: gauge.densityUnit, lengthUnit: gauge.lengthUnit, gaugeId: gauge.gaugeId }
    case 'plain':
      return { densityUnit: plain.densityUnit }
  }
}
