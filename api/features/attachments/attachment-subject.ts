import type { EntityManager } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { forbidden, notFound } from '#api/errors.ts'
import { canHandleFile, fileSideOfTest } from '#shared/policies/attachment.ts'
import type { FileSide } from '#shared/policies/attachment.ts'
import type { Role } from '#shared/policies/role.ts'
import type { AttachmentQuery } from '#shared/schemas/attachment.ts'

export interface Subject {
  readonly type: AttachmentQuery['subject']
  readonly id: string
  /** as people call it: T-0142, RB-3 */
  readonly name: string
  readonly side: FileSide
}

/** The record a file belongs to; 404 when the site has none such. */
export async function loadSubject(manager: EntityManager, siteId: string, { subject, subjectId: id }: AttachmentQuery): Promise<Subject> {
  switch (subject) {
    case 'test': {
      const test = await manager.findOne(FieldTestEntity, { where: { siteId, id }, select: { siteId: true, id: true, number: true, purpose: true } })
      if (!test) throw notFound()
      return { type: subject, id, name: test.number, side: fileSideOfTest(test.purpose) }
    }
    case 'curve': {
      const curve = await manager.findOne(ReferenceCurveEntity, { where: { siteId, id }, select: { siteId: true, id: true, code: true } })
      if (!curve) throw notFound()
      return { type: subject, id, name: curve.code, side: 'contractor' }
    }
  }
}

/** 403 unless the role may add files to the record, or withdraw them from it. */
export function authorizeFile(role: Role, verb: 'file.attach' | 'file.withdraw', { name, side }: Subject): void {
  if (canHandleFile(role, verb, side)) return
  const whose = side === 'owner' ? 'the owner’s representative' : verb === 'file.attach' ? 'quality control' : 'the QC lead'
  throw forbidden(`Files of ${name} are ${verb === 'file.attach' ? 'added' : 'withdrawn'} by ${whose}. Nothing was changed.`)
}
