import { checkApparatus, hasEditions, type MethodEdition, type MouldSize } from '#shared/domain/compaction-method.ts'
import type { Curve, CreateCurve, Material } from '#shared/schemas/lab.ts'
import { createCurveSchema } from '#shared/schemas/lab.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { Units } from '#web/lib/units.ts'
import type { EntryForm, EntryRow } from './entry-columns.ts'
import { EMPTY_ROW, readEntry } from './read-entry.ts'

export type CurveForm = {
  readonly code: string
  readonly materialId: string
  readonly method: CreateCurve['method']
  readonly procedure: CreateCurve['procedure']
  /** issue of D698 and D1557 */
  readonly edition: MethodEdition
  readonly entry: EntryForm
  readonly mould: MouldSize | ''
  readonly layers: string
  readonly blows: string
  readonly oversize: string
  readonly gs: string
  readonly gsMeasured: boolean
  readonly sampledAt: string
  readonly withReported: boolean
  readonly reportedDensity: string
  readonly reportedMoisture: string
  readonly reportedReason: string
  readonly withCoarse: boolean
  readonly coarseGravity: string
  readonly coarseMoisture: string
}

/** A blank sheet, with what the material already says. */
export function emptyCurveForm(material: Pick<Material, 'id' | 'gs' | 'gsMeasured'> | undefined, sampledAt: string, us: boolean): CurveForm {
  return {
    code: '',
    materialId: material?.id ?? '',
    method: 'D698',
    procedure: 'A',
    edition: '2007',
    entry: {
      kind: 'dry',
      moistureBy: 'stated',
      densityUnit: us ? 'pcf' : 'kN/m3',
      massUnit: 'g',
      tinUnit: 'g',
      volumeUnit: us ? 'ft3' : 'cm3',
      mould: '',
      mouldVolume: '',
      rows: Array.from({ length: 5 }, () => EMPTY_ROW),
    },
    mould: '',
    layers: '',
    blows: '',
    oversize: '',
    ...gravityOf(material),
    sampledAt,
    withReported: false,
    reportedDensity: '',
    reportedMoisture: '',
    reportedReason: '',
    withCoarse: false,
    coarseGravity: '',
    coarseMoisture: '0',
  }
}

/** The specific gravity a new curve of a material begins with; blank where the material does not know it. */
export function gravityOf(material: Pick<Material, 'gs' | 'gsMeasured'> | undefined): Pick<CurveForm, 'gs' | 'gsMeasured'> {
  return { gs: String(material?.gs ?? ''), gsMeasured: material?.gsMeasured ?? false }
}

/** A draft as it was entered, to be put right. */
export function formOfCurve(curve: Curve, units: Units): CurveForm {
  const us = units.system === 'us'
  const blank = emptyCurveForm(undefined, units.field.instant(curve.sampledAt), us)
  const { reported, coarse, apparatus } = curve
  const text = (value: number | null | undefined) => String(value ?? '')
  return {
    ...blank,
    code: curve.code,
    materialId: curve.materialId,
    method: curve.method,
    procedure: curve.procedure,
    edition: apparatus?.edition ?? '2007',
    mould: apparatus?.mould ?? '',
    entry: curve.entry === null ? { ...blank.entry, rows: curve.points.map((point) => ({ moisture: String(point.moisture), density: units.field.densityKgM3(point.dryDensity) })) } : entryForm(curve.entry, blank.entry),
    layers: text(apparatus?.layers),
    blows: text(apparatus?.blows),
    oversize: text(apparatus?.oversizePercent),
    gs: String(curve.gs),
    gsMeasured: curve.gsMeasured,
    ...(reported === null ? {} : { withReported: true, reportedDensity: units.field.densityKgM3(reported.maxDryDensity), reportedMoisture: String(reported.optimumMoisture), reportedReason: reported.reason }),
    ...(coarse === null ? {} : { withCoarse: true, coarseGravity: String(coarse.bulkGravity), coarseMoisture: String(coarse.moisture) }),
  }
}

function entryForm(entry: NonNullable<Curve['entry']>, blank: EntryForm): EntryForm {
  const moistures = entry.specimens.map((specimen) => specimen.moisture)
  const tins = moistures.map((moisture) => ('tins' in moisture ? moisture.tins : []))
  const tinUnit = moistures.flatMap((moisture) => ('massUnit' in moisture ? [moisture.massUnit] : []))[0] ?? blank.tinUnit
  const rows = entry.specimens.map((specimen, i): EntryRow => {
    const { moisture } = specimen
    const [first, second] = tins[i] ?? []
    return {
      ...('percent' in moisture ? { moisture: String(moisture.percent) } : {}),
      ...(first === undefined ? {} : { wet1: String(first.wetAndTin), dry1: String(first.dryAndTin), tin1: String(first.tin) }),
      ...(second === undefined ? {} : { wet2: String(second.wetAndTin), dry2: String(second.dryAndTin), tin2: String(second.tin) }),
      ...('mouldAndSoil' in specimen ? { soil: String(specimen.mouldAndSoil) } : { density: String(specimen.density) }),
      ...('wetDensity' in specimen && specimen.wetDensity !== undefined ? { wetDensity: String(specimen.wetDensity) } : {}),
    }
  })
  const most = Math.max(0, ...tins.map((own) => own.length))
  const moistureBy = most === 0 ? 'stated' : most === 1 ? 'one-tin' : 'two-tins'
  const shared = { ...blank, kind: entry.kind, moistureBy, tinUnit, rows } as const
  if (entry.kind !== 'masses') return { ...shared, densityUnit: entry.densityUnit }
  return { ...shared, massUnit: entry.massUnit, volumeUnit: entry.volumeUnit, mould: String(entry.mould), mouldVolume: String(entry.mouldVolume) }
}

export type ReadCurve = { readonly ok: true; readonly curve: CreateCurve } | { readonly ok: false; readonly errors: Readonly<Record<string, string>> }

/** What to send, or what is wrong beside each field (by the schema's paths, the first words of each). */
export function readCurveForm(id: string, form: CurveForm, units: Units): ReadCurve {
  const numberOf = (text: string) => {
    const parsed = units.parse.number(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const densityOf = (text: string) => {
    const parsed = units.parse.densityKgM3(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const optional = (text: string) => (text.trim() === '' ? null : numberOf(text))
  const read = readEntry(form.entry)
  const parsed = createCurveSchema.safeParse({
    id,
    code: form.code,
    materialId: form.materialId,
    method: form.method,
    procedure: form.procedure,
    points: [...read.points],
    entry: read.entry.specimens.length === 0 ? null : read.entry,
    apparatus: { ...(hasEditions(form.method) ? { edition: form.edition } : {}), mould: form.mould === '' ? null : form.mould, layers: optional(form.layers), blows: optional(form.blows), oversizePercent: optional(form.oversize) },
    gs: numberOf(form.gs),
    gsMeasured: form.gsMeasured,
    coarse: form.withCoarse ? { bulkGravity: numberOf(form.coarseGravity), moisture: numberOf(form.coarseMoisture) } : null,
    reported: form.withReported ? { maxDryDensity: densityOf(form.reportedDensity), optimumMoisture: numberOf(form.reportedMoisture), reason: form.reportedReason } : null,
    sampledAt: units.parse.instant(form.sampledAt) ?? '',
  })
  const method = methodProblem(form, numberOf)
  if (parsed.success && (read.whole || read.entry.specimens.length === 0) && method === null) return { ok: true, curve: parsed.data }
  const errors: Record<string, string> = {}
  for (const issue of parsed.success ? [] : parsed.error.issues) errors[issue.path.join('.')] ??= issue.message
  if (form.materialId === '') errors.materialId = 'Choose a material'
  if (method !== null) errors[method.field] = method.message
  if (read.mouldError !== undefined) errors.mould = read.mouldError
  if (read.mouldVolumeError !== undefined) errors.mouldVolume = read.mouldVolumeError
  return { ok: false, errors }
}

function methodProblem(form: CurveForm, numberOf: (text: string) => number): { readonly field: string; readonly message: string } | null {
  const check = checkMethod(form, numberOf)
  return check.ok ? null : { field: check.field === 'procedure' ? 'procedure' : 'apparatus.oversizePercent', message: check.reason.message }
}

/** What the sheet says of its apparatus, held to the method. */
export function checkMethod({ method, procedure, edition, entry, mould, layers, blows, oversize }: CurveForm, numberOf: (text: string) => number): ReturnType<typeof checkApparatus> {
  const given = (text: string) => (Number.isFinite(numberOf(text)) ? numberOf(text) : null)
  const volume = entry.kind === 'masses' ? given(entry.mouldVolume) : null
  return checkApparatus(method, procedure, {
    edition,
    mould: mould === '' ? null : mould,
    mouldVolumeCm3: volume === null ? null : convertVolume(volume, entry.volumeUnit, 'cm3'),
    layers: given(layers),
    blows: given(blows),
    oversizePercent: given(oversize),
  })
}
