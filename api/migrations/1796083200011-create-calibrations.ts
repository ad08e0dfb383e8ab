import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Calibrations of the apparatus that field sheets are reduced with. */
export class CreateCalibrations1796083200011 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `calibration`')
  }
}

const UP = [
  `CREATE TABLE \`calibration\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`kind\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`apparatus\` varchar(80) NOT NULL,
    \`sheet\` json NOT NULL,
    \`value\` double NOT NULL,
    \`spread_percent\` double NOT NULL,
    \`flags\` json NOT NULL,
    \`performed_at\` datetime(3) NOT NULL,
    \`valid_until\` datetime(3) NULL,
    \`recorded_at\` datetime(3) NOT NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`remarks\` varchar(2000) NOT NULL,
    \`voided_at\` datetime(3) NULL,
    \`voided_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`void_reason\` varchar(2000) NULL,
    INDEX \`ix_calibration_performed\` (\`site_id\`, \`kind\`, \`performed_at\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`calibration\`
    ADD CONSTRAINT \`fk_calibration_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]
