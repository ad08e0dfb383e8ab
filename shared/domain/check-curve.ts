import type { LabPoint } from '#shared/domain/curve-points.ts'
import { curveOff, fitFamily } from '#shared/domain/family-of-curves.ts'
import type { CurveOff, FamilyFit, FamilyMember } from '#shared/domain/family-of-curves.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'

/** A curve of the site as a check needs it. */
export interface SiteCurve extends Omit<FamilyMember, 'pair'> {
  readonly materialId: string
  readonly status: 'draft' | 'approved' | 'superseded' | 'withdrawn'
  readonly pair: MaximumPair | null
}

export interface CurveCheck {
  readonly members: readonly FamilyMember[]
  readonly fit: FamilyFit
  readonly off: CurveOff | null
}

/** The family of a curve: the approved curves of its material, of its method and letter (AASHTO R 75: one method throughout). */
export function familyOf(curve: Pick<SiteCurve, 'materialId' | 'method' | 'procedure'>, curves: readonly SiteCurve[]): FamilyMember[] {
  return curves.flatMap((other) => {
    const { pair, ...rest } = other
    const belongs = other.status === 'approved' && other.materialId === curve.materialId && other.method === curve.method && other.procedure === curve.procedure
    return belongs && pair !== null ? [{ ...rest, pair }] : []
  })
}

/**
 * Checks the curve in use by one point in its family: which curve fits, and how far the one in use is off.
 * @param point percent of dry mass and kg/m³ dry; compacted: method and letter of the specimen; waterDensity kg/m³
 */
export function checkCurve(
  inUse: SiteCurve,
  curves: readonly SiteCurve[],
  input: { readonly point: LabPoint; readonly compacted: Pick<FamilyMember, 'method' | 'procedure'>; readonly waterDensity: number },
): CurveCheck {
  const members = familyOf(inUse, curves)
  const fit = fitFamily({ members, ...input })
  return { members, fit, off: inUse.pair === null ? null : curveOff(inUse.pair, fit) }
}
