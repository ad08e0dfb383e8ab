import type { EntityManager } from 'typeorm'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import type { SpecificationEntity } from '#api/entities/specification.entity.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { refusal, refuseIf } from '#api/http/refuse-input.ts'
import type { ReducedSheet } from '#shared/domain/field-sheets.ts'
import { oversizeSieve } from '#shared/domain/oversize.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { judge } from '#shared/domain/verdict.ts'
import type { CoarsePart, Verdict } from '#shared/domain/verdict-types.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

export type JudgedSheet =
  | { readonly ok: true; readonly reduced: ReducedSheet; readonly verdict: Verdict }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

type Sheet = Pick<CreateTest, 'sheet' | 'oversizePercent'>

/** A reference curve of this site; another site's is not there. */
export async function loadCurve(manager: EntityManager, siteId: string, curveId: string): Promise<ReferenceCurveEntity> {
  const curve = await manager.findOneBy(ReferenceCurveEntity, { siteId, id: curveId })
  if (!curve) throw refusal([{ path: 'body.curveId', message: 'That reference curve is not one of this site’s. Choose one from the list.' }])
  return curve
}

/** Reduces a sheet and judges it by a specification; fields of the problems are named as the request names them. */
export function judgeSheet({ sheet, oversizePercent }: Sheet, plan: SitePlan, curve: ReferenceCurveEntity, specification: SpecificationEntity): JudgedSheet {
  const { maxDryDensity, optimumMoisture, gs, gsMeasured } = curve
  if (maxDryDensity === null || optimumMoisture === null) {
    return { ok: false, problems: [{ field: 'curveId', code: 'curve-without-pair', message: 'This curve has no maximum yet. Choose another, or add points to it.' }] }
  }
  const reduced = reduceSheet(sheet)
  if (!reduced.ok) return { ok: false, problems: reduced.problems.map((problem) => ({ ...problem, field: `sheet.${problem.field}` })) }
  const { criteria, rounding, repeatability } = specification.body
  const judgement = judge(
    { dryDensity: reduced.dryDensity, moisture: reduced.moisture, oversizeShare: oversizePercent ?? undefined },
    { curve: { maxDryDensity, optimumMoisture, gs, gsMeasured, coarse: coarseOf(curve) }, criteria, rounding, repeatability, waterDensity: plan.site.waterDensity },
  )
  if (!judgement.ok) return { ok: false, problems: judgement.problems.map((problem) => ({ ...problem, field: requestField(problem.field) })) }
  return { ok: true, reduced, verdict: judgement.verdict }
}

/** What the curve knows of the stones its mould left out, with their sieve. */
export function coarseOf({ coarse, method, procedure }: ReferenceCurveEntity): CoarsePart | undefined {
  return coarse ? { ...coarse, sieve: oversizeSieve(method, procedure) } : undefined
}

/** As judgeSheet; what keeps a sheet from being judged is refused, each field named. */
export function judgeOrRefuse(...sheet: Parameters<typeof judgeSheet>): Extract<JudgedSheet, { ok: true }> {
  const judged = judgeSheet(...sheet)
  if (judged.ok) return judged
  refuseIf(judged.problems.map(({ field, message }) => ({ path: `body.${field}`, message })))
  throw new Error('A sheet was refused without a reason')
}

function requestField(field: string): string {
  if (field === 'oversizeShare') return 'oversizePercent'
  if (field === 'dryDensity') return 'sheet.density'
  if (field === 'moisture') return 'sheet.moisture'
  return field.startsWith('curve.') ? 'curveId' : 'sheet'
}

/** What is worth knowing about the curve a test is judged by. */
export function curveFlags(curve: ReferenceCurveEntity, materialId: string | null): Reason[] {
  const flags: Reason[] = []
  if (curve.status === 'draft') flags.push({ code: 'curve-draft', message: `Curve ${curve.code} is not approved yet.` })
  if (curve.status === 'superseded') flags.push({ code: 'curve-superseded', message: `Curve ${curve.code} was superseded by a newer one.` })
  if (materialId !== null && materialId !== curve.materialId) {
    flags.push({ code: 'curve-other-material', message: `Curve ${curve.code} is not of the material placed here.` })
  }
  return flags
}
