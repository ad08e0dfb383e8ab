import type { MigrationInterface, QueryRunner } from 'typeorm'

/** A share of 4.999 % is below the 5 % from which the reference is corrected; two decimals made 5.00 of it. */
export class KeepOversizeAsEntered1796083200020 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE `field_test` MODIFY `oversize_percent` double NULL')
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE `field_test` MODIFY `oversize_percent` decimal(6,2) NULL')
  }
}
