import type { MigrationInterface, QueryRunner } from 'typeorm'

/** What takes the place of a curve, and every verdict a test had before the current one. */
export class KeepVerdicts1796083200015 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const UP = [
  `ALTER TABLE \`reference_curve\`
    ADD \`successor_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    ADD \`superseded_at\` datetime(3) NULL,
    ADD \`superseded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    ADD \`supersede_reason\` varchar(2000) NULL`,
  `ALTER TABLE \`reference_curve\`
    ADD CONSTRAINT \`fk_reference_curve_successor\` FOREIGN KEY (\`site_id\`, \`successor_id\`)
    REFERENCES \`reference_curve\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `CREATE TABLE \`test_verdict\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`test_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`version\` int NOT NULL,
    \`curve_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`specification_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`verdict\` json NOT NULL,
    \`marks\` json NOT NULL,
    \`judged_at\` datetime(3) NOT NULL,
    \`judged_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`reason\` varchar(2000) NULL,
    PRIMARY KEY (\`site_id\`, \`test_id\`, \`version\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`test_verdict\`
    ADD CONSTRAINT \`fk_test_verdict_test\` FOREIGN KEY (\`site_id\`, \`test_id\`)
    REFERENCES \`field_test\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`test_verdict\`
    ADD CONSTRAINT \`fk_test_verdict_curve\` FOREIGN KEY (\`site_id\`, \`curve_id\`)
    REFERENCES \`reference_curve\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`test_verdict\`
    ADD CONSTRAINT \`fk_test_verdict_specification\` FOREIGN KEY (\`site_id\`, \`specification_id\`)
    REFERENCES \`specification\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]

const DOWN = [
  'DROP TABLE `test_verdict`',
  'ALTER TABLE `reference_curve` DROP FOREIGN KEY `fk_reference_curve_successor`',
  'ALTER TABLE `reference_curve` DROP INDEX `fk_reference_curve_successor`',
  'ALTER TABLE `reference_curve` DROP COLUMN `supersede_reason`, DROP COLUMN `superseded_by`, DROP COLUMN `superseded_at`, DROP COLUMN `successor_id`',
]
