import { Entity, ForeignKey } from 'typeorm'
import { IdColumn, InstantColumn, JsonColumn, PrimaryIdColumn, PrimaryIntColumn, TextColumn } from '#api/entities/columns.ts'
import type { LotMark } from '#shared/domain/lot-facts.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'

/**
 * Every verdict of a test that was judged again, the first one too; the last is the one field_test carries. A test that was
 * judged once has no row here.
 */
@ForeignKey('FieldTestEntity', ['siteId', 'testId'], ['siteId', 'id'], { name: 'fk_test_verdict_test' })
@ForeignKey('ReferenceCurveEntity', ['siteId', 'curveId'], ['siteId', 'id'], { name: 'fk_test_verdict_curve' })
@ForeignKey('SpecificationEntity', ['siteId', 'specificationId'], ['siteId', 'id'], { name: 'fk_test_verdict_specification' })
@Entity('test_verdict')
export class TestVerdictEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('test_id')
  testId!: string

  /** 1 is the verdict it was recorded with */
  @PrimaryIntColumn('version')
  version!: number

  @IdColumn('curve_id')
  curveId!: string

  /** the specification its frozen limits are of; null where no version of the zone's has these limits any more */
  @IdColumn('specification_id', { nullable: true })
  specificationId!: string | null

  @JsonColumn('verdict')
  verdict!: Verdict

  /** the ground this verdict marked */
  @JsonColumn('marks')
  marks!: readonly { readonly kind: LotMark['kind']; readonly cells: readonly number[] }[]

  @InstantColumn('judged_at')
  judgedAt!: Date

  @IdColumn('judged_by')
  judgedBy!: string

  /** null for the first */
  @TextColumn('reason', 2000, { nullable: true })
  reason!: string | null
}
