import type { MigrationInterface, QueryRunner } from 'typeorm'

/** What a curve knows of the stones that its mould left out. */
export class AddCoarsePartToCurves1796083200010 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE `reference_curve` ADD `coarse` json NULL AFTER `gs_measured`')
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE `reference_curve` DROP COLUMN `coarse`')
  }
}
