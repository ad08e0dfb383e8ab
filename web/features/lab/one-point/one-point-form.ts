import type { OnePointSheet } from '#shared/domain/one-point.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { createOnePointSchema, type CreateOnePoint } from '#shared/schemas/one-point.ts'
import type { Units } from '#web/lib/units.ts'

export const MOISTURE_METHODS = ['oven', 'microwave', 'carbide', 'stated'] as const
export const MASS_UNITS = ['g', 'kg', 'lb'] as const
export const VOLUME_UNITS = ['ft3', 'cm3'] as const
export const DENSITY_UNITS = ['pcf', 'kg/m3', 'g/cm3', 'kN/m3'] as const

/** Everything typed on the sheet, as text. */
export type OnePointForm = {
  readonly curveId: string
  readonly testId: string
  readonly method: CreateOnePoint['method']
  readonly procedure: CreateOnePoint['procedure']
  readonly kind: OnePointSheet['kind']
  readonly massUnit: (typeof MASS_UNITS)[number]
  readonly mouldAndSoil: string
  readonly mould: string
  readonly mouldVolume: string
  readonly volumeUnit: (typeof VOLUME_UNITS)[number]
  readonly densityUnit: (typeof DENSITY_UNITS)[number]
  readonly wetDensity: string
  readonly moistureMethod: (typeof MOISTURE_METHODS)[number]
  readonly wetAndTin: string
  readonly dryAndTin: string
  readonly tin: string
  readonly reading: string
  readonly percent: string
  readonly sampledAt: string
  readonly remarks: string
}

export function emptyOnePoint(curve: Curve | undefined, testId: string, sampledAt: string, us: boolean): OnePointForm {
  return {
    curveId: curve?.id ?? '',
    testId,
    method: curve?.method ?? 'D698',
    procedure: curve?.procedure ?? 'A',
    kind: 'mould',
    massUnit: 'g',
    mouldAndSoil: '',
    mould: '',
    mouldVolume: '',
    volumeUnit: us ? 'ft3' : 'cm3',
    densityUnit: us ? 'pcf' : 'kN/m3',
    wetDensity: '',
    moistureMethod: 'microwave',
    wetAndTin: '',
    dryAndTin: '',
    tin: '',
    reading: '',
    percent: '',
    sampledAt,
    remarks: '',
  }
}

/** The readings as numbers; what is blank or no number is NaN, which the reduction names. */
export function sheetOf(form: OnePointForm, units: Units): OnePointSheet {
  const number = (text: string) => {
    const parsed = units.parse.number(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const moisture = (): OnePointSheet['moisture'] => {
    switch (form.moistureMethod) {
      case 'oven':
      case 'microwave':
        return { method: form.moistureMethod, massUnit: 'g', wetAndTin: number(form.wetAndTin), dryAndTin: number(form.dryAndTin), tin: number(form.tin) }
      case 'carbide':
        return { method: 'carbide', readingPercent: number(form.reading) }
      case 'stated':
        return { method: 'stated', percent: number(form.percent) }
    }
  }
  return form.kind === 'density'
    ? { kind: 'density', densityUnit: form.densityUnit, wetDensity: number(form.wetDensity), moisture: moisture() }
    : { kind: 'mould', massUnit: form.massUnit, mouldAndSoil: number(form.mouldAndSoil), mould: number(form.mould), mouldVolume: number(form.mouldVolume), volumeUnit: form.volumeUnit, moisture: moisture() }
}

export type ReadOnePoint = { readonly ok: true; readonly input: CreateOnePoint } | { readonly ok: false; readonly errors: Readonly<Record<string, string>> }

/** What to send, or what is wrong beside each field, by the schema's paths. */
export function readOnePoint(id: string, form: OnePointForm, units: Units): ReadOnePoint {
  const { curveId, testId, method, procedure, remarks } = form
  const parsed = createOnePointSchema.safeParse({
    id,
    curveId,
    method,
    procedure,
    testId: testId === '' ? null : testId,
    sheet: sheetOf(form, units),
    sampledAt: units.parse.instant(form.sampledAt) ?? '',
    remarks,
  })
  if (parsed.success) return { ok: true, input: parsed.data }
  const errors: Record<string, string> = {}
  for (const issue of parsed.error.issues) errors[issue.path.join('.')] ??= issue.message
  if (curveId === '') errors.curveId = 'Choose the curve in use'
  return { ok: false, errors }
}
