import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Specific gravity of a material; a curve's specimens as they were written down, its apparatus, and a draft taken back. */
export class AddLabSheet1796083200014 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE `borrow_material` ADD `gs` decimal(6,3) NULL, ADD `gs_measured` tinyint NOT NULL DEFAULT 0')
    await runner.query('ALTER TABLE `borrow_material` ALTER `gs_measured` DROP DEFAULT')
    await runner.query('ALTER TABLE `reference_curve` ADD `entry` json NULL, ADD `apparatus` json NULL, ADD `withdraw_reason` varchar(2000) NULL')
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE `reference_curve` DROP COLUMN `withdraw_reason`, DROP COLUMN `apparatus`, DROP COLUMN `entry`')
    await runner.query('ALTER TABLE `borrow_material` DROP COLUMN `gs_measured`, DROP COLUMN `gs`')
  }
}
