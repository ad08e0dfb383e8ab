import type { MigrationInterface, QueryRunner } from 'typeorm'

/** The register of nuclear gauges: calibrations, standard counts, times out of service, moisture corrections; and the gauge a test names. */
export class CreateGauges1796083200012 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const ID = 'char(36) CHARACTER SET ascii COLLATE ascii_bin'
const DAY = 'char(10) CHARACTER SET ascii COLLATE ascii_bin'
const OWNED = `\`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` ${ID} NOT NULL,
    \`id\` ${ID} NOT NULL`
const OF_GAUGE = ['gauge_calibration', 'gauge_outage', 'standard_count', 'gauge_correction']

const UP = [
  `CREATE TABLE \`gauge\` (
    ${OWNED},
    \`serial\` varchar(80) NOT NULL,
    \`model\` varchar(200) NOT NULL,
    \`leak_tested_on\` ${DAY} NULL,
    UNIQUE INDEX \`uq_gauge_serial\` (\`site_id\`, \`serial\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`gauge_calibration\` (
    ${OWNED},
    \`gauge_id\` ${ID} NOT NULL,
    \`calibrated_on\` ${DAY} NOT NULL,
    \`due_on\` ${DAY} NULL,
    \`density_count\` decimal(12,2) NOT NULL,
    \`moisture_count\` decimal(12,2) NOT NULL,
    \`recorded_by\` ${ID} NOT NULL,
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`gauge_outage\` (
    ${OWNED},
    \`gauge_id\` ${ID} NOT NULL,
    \`from_at\` datetime(3) NOT NULL,
    \`reason\` varchar(2000) NOT NULL,
    \`taken_out_by\` ${ID} NOT NULL,
    \`until_at\` datetime(3) NULL,
    \`returned_by\` ${ID} NULL,
    \`return_remarks\` varchar(2000) NULL,
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`standard_count\` (
    ${OWNED},
    \`gauge_id\` ${ID} NOT NULL,
    \`counted_at\` datetime(3) NOT NULL,
    \`day\` ${DAY} NOT NULL,
    \`density_count\` decimal(12,2) NOT NULL,
    \`moisture_count\` decimal(12,2) NOT NULL,
    \`stability\` json NULL,
    \`remarks\` varchar(2000) NOT NULL,
    \`counted_by\` ${ID} NOT NULL,
    \`voided_at\` datetime(3) NULL,
    \`voided_by\` ${ID} NULL,
    \`void_reason\` varchar(2000) NULL,
    INDEX \`ix_standard_count_day\` (\`site_id\`, \`gauge_id\`, \`day\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`gauge_correction\` (
    ${OWNED},
    \`gauge_id\` ${ID} NOT NULL,
    \`material_id\` ${ID} NOT NULL,
    \`pairs\` json NOT NULL,
    \`in_force_from\` datetime(3) NOT NULL,
    \`remarks\` varchar(2000) NOT NULL,
    \`recorded_by\` ${ID} NOT NULL,
    \`withdrawn_at\` datetime(3) NULL,
    \`withdrawn_by\` ${ID} NULL,
    \`withdraw_reason\` varchar(2000) NULL,
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`field_test\` ADD \`gauge_id\` ${ID} NULL`,
  `ALTER TABLE \`gauge\`
    ADD CONSTRAINT \`fk_gauge_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  ...OF_GAUGE.map(
    (table) => `ALTER TABLE \`${table}\`
    ADD CONSTRAINT \`fk_${table}_gauge\` FOREIGN KEY (\`site_id\`, \`gauge_id\`)
    REFERENCES \`gauge\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  ),
  `ALTER TABLE \`gauge_correction\`
    ADD CONSTRAINT \`fk_gauge_correction_material\` FOREIGN KEY (\`site_id\`, \`material_id\`)
    REFERENCES \`borrow_material\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`field_test\`
    ADD CONSTRAINT \`fk_field_test_gauge\` FOREIGN KEY (\`site_id\`, \`gauge_id\`)
    REFERENCES \`gauge\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]

const DOWN = [
  'ALTER TABLE `field_test` DROP FOREIGN KEY `fk_field_test_gauge`',
  'ALTER TABLE `field_test` DROP INDEX `fk_field_test_gauge`',
  'ALTER TABLE `field_test` DROP COLUMN `gauge_id`',
  ...[...OF_GAUGE].reverse().map((table) => `DROP TABLE \`${table}\``),
  'DROP TABLE `gauge`',
]
