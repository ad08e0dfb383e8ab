import { Entity, ForeignKey, Index } from 'typeorm'
import { IntColumn, PrimaryIdColumn, PrimaryIntColumn, WordColumn } from '#api/entities/columns.ts'

@Index('ix_test_mark_place', ['siteId', 'lift', 'cell'])
@ForeignKey('FieldTestEntity', ['siteId', 'testId'], ['siteId', 'id'], { name: 'fk_test_mark_test' })
@Entity('test_mark')
export class TestMarkEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('test_id')
  testId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @IntColumn('lift')
  lift!: number

  @WordColumn('kind')
  kind!: 'fail' | 'suspect' | 'hold'
}
