import { refuseIf } from '#api/http/refuse-input.ts'
import type { InputIssue } from '#api/http/validate.ts'
import { checkApparatus } from '#shared/domain/compaction-method.ts'
import type { ApparatusCheck } from '#shared/domain/compaction-method.ts'
import { reduceEntry } from '#shared/domain/compaction-specimen.ts'
import type { Reason } from '#shared/domain/result.ts'
import type { CreateCurve } from '#shared/schemas/lab.ts'
import { convertVolume } from '#shared/units/volume.ts'

type LabSheet = Pick<CreateCurve, 'method' | 'procedure' | 'points' | 'entry' | 'apparatus'>

/** The points of a laboratory's sheet: those of its specimens where they are given, or 400 with every field that cannot be. */
export function pointsOfSheet({ points, entry }: LabSheet): CreateCurve['points'] {
  if (!entry) return points
  const reduced = reduceEntry(entry)
  if (reduced.ok) return [...reduced.points]
  refuseIf(reduced.problems.map(({ field, message }) => ({ path: `body.entry.${field}`, message })))
  throw new Error('Specimens were refused without a reason')
}

/** What keeps the method from being used for this soil. */
export function methodIssues(sheet: LabSheet): InputIssue[] {
  const check = checkSheet(sheet)
  if (check.ok) return []
  return [{ path: check.field === 'procedure' ? 'body.procedure' : 'body.apparatus.oversizePercent', message: check.reason.message }]
}

/** Where the sheet departs from its method, or states what does not belong together. */
export function sheetFlags(sheet: LabSheet): Reason[] {
  const check = checkSheet(sheet)
  const reduced = sheet.entry ? reduceEntry(sheet.entry) : null
  const flags = [...(check.ok ? check.flags : [check.reason]), ...(reduced?.ok ? reduced.flags : [])]
  return flags.map(({ code, message }) => ({ code, message }))
}

function checkSheet({ method, procedure, entry, apparatus }: LabSheet): ApparatusCheck {
  const mouldVolumeCm3 = entry?.kind === 'masses' ? convertVolume(entry.mouldVolume, entry.volumeUnit, 'cm3') : null
  return checkApparatus(method, procedure, {
    edition: apparatus?.edition,
    mould: apparatus?.mould,
    mouldVolumeCm3,
    layers: apparatus?.layers ?? null,
    blows: apparatus?.blows ?? null,
    oversizePercent: apparatus?.oversizePercent ?? null,
  })
}
