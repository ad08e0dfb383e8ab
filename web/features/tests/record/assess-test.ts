import type { RawSheet, ReducedSheet } from '#shared/domain/field-sheets.ts'
import { DEPTH_WARNING_WORDS, testLayer } from '#shared/domain/lift-schedule.ts'
import { gaugeIdOf, usesGauge } from '#shared/domain/gauge-check.ts'
import { oversizeSieve } from '#shared/domain/oversize.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import { reduceDriveCylinder } from '#shared/domain/drive-cylinder.ts'
import { reduceRubberBalloon } from '#shared/domain/rubber-balloon.ts'
import { reduceSandCone } from '#shared/domain/sand-cone.ts'
import { judge } from '#shared/domain/verdict.ts'
import type { ReferencePair, Verdict } from '#shared/domain/verdict-types.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import { toMicrometres } from '#shared/units/length.ts'
import type { SiteContextValue } from '#web/lib/site-context.tsx'
import { parseNumber } from '#web/lib/units.ts'
import { placeTest, type Place } from './place-test.ts'
import { formField, isFinite, reading, readSheet, SECTION, textAt } from './read-sheet.ts'
import type { TestForm } from './test-form.ts'

/** What stands at one field: `missing` is not said before the field was left or saving was tried. */
export interface Problem {
  readonly message: string
  readonly missing: boolean
}

export interface Assessment {
  readonly place: Place | null
  readonly lift: number | null
  readonly curve: Curve | null
  readonly sheet: CreateTest['sheet']
  readonly reduced: ReducedSheet | null
  readonly holeVolumeCm3: number | null
  readonly verdict: Verdict | null
  readonly depthUm: number | null
  readonly surfaceUm: number | null
  readonly oversizePercent: number | null
  readonly sampledAt: string | null
  readonly problems: ReadonlyMap<string, Problem>
  /** outside an apparatus limit or unlikely: may be saved, flagged */
  readonly flags: ReadonlyMap<string, string>
  /** what POST …/tests takes; null while something is missing */
  readonly input: Omit<CreateTest, 'liftConfirmed'> | null
}

interface Known {
  readonly context: SiteContextValue
  readonly stakes: readonly Stake[]
  readonly curves: readonly Curve[]
  readonly follows: CreateTest['follows']
  /** the site has a register of gauges, so that a gauge test names its gauge */
  readonly registered: boolean
}

const CLIENT_DEPTH_TOLERANCE_UM = 25_400

/** Everything that follows from what is typed, worked out again at every key. */
export function assessTest(form: TestForm, { context, stakes, curves, follows, registered }: Known): Assessment {
  const { units, site } = context
  const problems = new Map<string, Problem>()
  const refuse = (field: string, message: string, missing = false): void => {
    if (!problems.has(field)) problems.set(field, { message, missing })
  }
  const placed = placeTest(form, context, stakes)
  if (!placed.ok) refuse(placed.field, placed.message, placed.missing)
  const place = placed.ok ? placed.place : null
  const lift = place?.layers.find((layer) => String(layer.lift) === form.lift)?.lift ?? null
  if (place && lift === null) refuse('lift', 'Choose the lift.', true)
  if (form.purpose === '') refuse('purpose', 'Choose what the test is for.', true)

  const sheet = readSheet(form)
  // the owner's check may be read with a gauge of the owner's own
  if (registered && usesGauge(sheet) && gaugeIdOf(sheet) === null && form.purpose !== 'verification') refuse('gauge.gaugeId', 'Choose the gauge it was read with.', true)
  if (form.moisture.method === 'gauge' && form.moisture.wall.by !== '' && form.moisture.wall.convention === '') refuse('moisture.wall.convention', 'Choose how the offset is signed: see the gauge’s manual.', true)
  const reduction = reduceSheet(sheet)
  if (!reduction.ok) {
    for (const { field, code, message } of reduction.problems) {
      const path = formField(form.method, field)
      const text = textAt(form, path)
      const typed = parseNumber(text)
      const unreadable = text.trim() !== '' && !typed.ok
      refuse(path, unreadable && !typed.ok ? `${typed.reason}.` : message, !unreadable && code === 'missing')
    }
  }
  const curve = curves.find((each) => each.id === form.curveId) ?? null
  if (curve === null) refuse('curveId', 'Choose the curve of this soil.', true)
  else if (curve.pair === null) refuse('curveId', 'This curve has no maximum yet. Choose another, or add points to it.')

  const oversizePercent = readOptional(form.oversize, 'oversize', (value) => (value >= 0 && value <= 100 ? null : 'The share must lie between 0 and 100 %.'), refuse)
  const depthUm = readDepth(form, units.parse.thicknessUm, refuse)
  const elevation = form.elevation.trim() === '' ? null : units.parse.elevationUm(form.elevation)
  if (elevation && !elevation.ok) refuse('elevation', `${elevation.reason}.`)
  const surfaceUm = elevation?.ok ? elevation.value : null
  const sampledAt = form.sampledAt === units.field.instant(form.openedAt) ? form.openedAt : units.parse.instant(form.sampledAt)
  if (sampledAt === null) refuse('sampledAt', 'Give the date and time it was sampled.', form.sampledAt === '')

  let verdict: Verdict | null = null
  if (reduction.ok && curve?.pair && place) {
    const { criteria, rounding, repeatability } = place.zone.specification
    const judgement = judge(
      { dryDensity: reduction.dryDensity, moisture: reduction.moisture, oversizeShare: oversizePercent ?? undefined },
      { curve: referenceOf(curve, curve.pair), criteria, rounding, repeatability, waterDensity: site.waterDensity },
    )
    if (judgement.ok) verdict = judgement.verdict
    else for (const { field, message } of judgement.problems) refuse(field === 'oversizeShare' ? 'oversize' : 'curveId', message)
  }
  const input =
    problems.size === 0 && place && lift !== null && depthUm !== null && sampledAt !== null && form.purpose !== '' && isFinite(sheet)
      ? {
          id: form.id,
          purpose: form.purpose,
          follows,
          // a stake stands for one lift; a test beneath or above it is taken at its point, not at it
          stakeId: place.stake?.lift === lift ? place.stake.id : null,
          at: { ...place.at },
          lift,
          surfaceUm,
          depthUm,
          sampledAt,
          curveId: form.curveId,
          oversizePercent,
          sheet,
          remarks: form.remarks,
        }
      : null
  return {
    place,
    lift,
    curve,
    sheet,
    reduced: reduction.ok ? reduction : null,
    holeVolumeCm3: holeVolume(sheet),
    verdict,
    depthUm,
    surfaceUm,
    oversizePercent,
    sampledAt,
    problems,
    flags: flagsOf(sheet, reduction.ok ? reduction.flags : [], { place, lift, surfaceUm, depthUm }),
    input,
  }
}

function referenceOf({ gs, gsMeasured, coarse, method, procedure }: Curve, pair: NonNullable<Curve['pair']>): ReferencePair {
  return { ...pair, gs, gsMeasured, coarse: coarse ? { ...coarse, sieve: oversizeSieve(method, procedure) } : undefined }
}

type Refuse = (field: string, message: string, missing?: boolean) => void

function readOptional(text: string, field: string, check: (value: number) => string | null, refuse: Refuse): number | null {
  if (text.trim() === '') return null
  const typed = parseNumber(text)
  const wrong = typed.ok ? check(typed.value) : `${typed.reason}.`
  if (wrong !== null) refuse(field, wrong)
  return typed.ok && wrong === null ? typed.value : null
}

/** Depth below the surface; a rod's depth stands for it where nothing else is typed. */
function readDepth(form: TestForm, parse: SiteContextValue['units']['parse']['thicknessUm'], refuse: Refuse): number | null {
  const typed = parse(form.depth)
  if (typed.ok) {
    if (typed.value >= 0 && typed.value <= 3_000_000) return typed.value
    refuse('depth', 'A test reaches from 0 to 3 m deep.')
    return null
  }
  if (form.depth.trim() !== '') {
    refuse('depth', `${typed.reason}.`)
    return null
  }
  const rod = form.method === 'nuclear-gauge' && form.gauge.mode === 'direct-transmission' ? reading(form.gauge.rodDepth) : NaN
  if (rod > 0) return toMicrometres(rod, form.gauge.lengthUnit)
  refuse('depth', 'Enter how deep the test reaches.', true)
  return null
}

function holeOf(sheet: RawSheet): ReturnType<typeof reduceSandCone> | null {
  switch (sheet.method) {
    case 'sand-cone':
      return reduceSandCone({ ...sheet, moistSoil: 1 })
    case 'rubber-balloon':
      return reduceRubberBalloon({ ...sheet, moistSoil: 1 })
    case 'drive-cylinder':
      return reduceDriveCylinder({ ...sheet, cylinderAndSoil: 2, cylinder: 1 })
    case 'nuclear-gauge':
    case 'plain':
      return null
  }
}

/** The hole as soon as its own readings are there, before the soil is weighed. */
function holeVolume(sheet: RawSheet): number | null {
  const hole = holeOf(sheet)
  return hole?.ok ? hole.holeVolumeCm3 : null
}

/** Where a flag is shown; what is said of the hole or its stones stands in the section of the method. */
const FLAG_FIELD: Readonly<Record<string, string>> = {
  'cylinder-gravel': 'cylinder.largestParticle',
  'not-constant-mass': 'moisture.dryAndTin',
  'outside-calibration': 'gauge.wetDensity',
  'rod-depth': 'gauge.rodDepth',
  'wall-offset-sign': 'moisture.wall.offset',
  'wall-backscatter': 'gauge.wetDensity',
  'standard-count-density': 'gauge.standardCounts.density',
  'standard-count-moisture': 'gauge.standardCounts.moisture',
  'carbide-range': 'moisture.readingPercent',
}

const HOLE_FIELD: Readonly<Record<string, string>> = { 'hole-small': 'hole', 'hole-large': 'hole', 'particle-large': 'largestParticle' }

function flagsOf(sheet: RawSheet, reasons: ReducedSheet['flags'], { place, lift, surfaceUm, depthUm }: Pick<Assessment, 'place' | 'lift' | 'surfaceUm' | 'depthUm'>): Map<string, string> {
  const hole = holeOf(sheet)
  const flags = new Map<string, string>()
  for (const { code, message } of [...reasons, ...(hole?.ok ? hole.flags : [])]) {
    const field = HOLE_FIELD[code] === undefined ? FLAG_FIELD[code] : `${SECTION[sheet.method]}.${HOLE_FIELD[code]}`
    if (field !== undefined && !flags.has(field)) flags.set(field, `${message} You may save it, flagged.`)
  }
  if (place && lift !== null && surfaceUm !== null && depthUm !== null && depthUm > 0) {
    const found = testLayer(place.layers, surfaceUm, depthUm, { toleranceUm: CLIENT_DEPTH_TOLERANCE_UM })
    if (!found.ok) flags.set('elevation', found.reason)
    else if (found.lift !== lift) flags.set('elevation', found.lift === 0 ? `This elevation lies in the foundation, not in lift ${lift}.` : `This elevation lies in lift ${found.lift}, not ${lift}.`)
    else if (found.warnings[0]) flags.set('depth', `${DEPTH_WARNING_WORDS[found.warnings[0]]} You may save it, flagged.`)
  }
  return flags
}
