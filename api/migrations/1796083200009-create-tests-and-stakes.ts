import type { MigrationInterface, QueryRunner } from 'typeorm'

/** The facts of the tests: their sheets and verdicts, the ground they marked, the stakes they are taken at. */
export class CreateTestsAndStakes1796083200009 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const UP = [
  `CREATE TABLE \`field_test\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`number\` varchar(40) NOT NULL,
    \`chain_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`follows_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`follow_kind\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`purpose\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`cell\` int NOT NULL,
    \`stake_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`easting\` double NOT NULL,
    \`northing\` double NOT NULL,
    \`u\` bigint NOT NULL,
    \`v\` bigint NOT NULL,
    \`surface_um\` bigint NULL,
    \`depth_um\` int NOT NULL,
    \`sampled_at\` datetime(3) NOT NULL,
    \`recorded_at\` datetime(3) NOT NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`method\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`sheet\` json NOT NULL,
    \`oversize_percent\` decimal(6,2) NULL,
    \`curve_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`remarks\` varchar(2000) NOT NULL,
    \`outcome\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`treated_as_fail\` tinyint NOT NULL,
    \`near\` tinyint NOT NULL,
    \`headline\` varchar(200) NOT NULL,
    \`wet_density\` double NOT NULL,
    \`dry_density\` double NOT NULL,
    \`moisture\` double NOT NULL,
    \`rc\` double NOT NULL,
    \`moisture_deviation\` double NOT NULL,
    \`verdict\` json NOT NULL,
    \`flags\` json NOT NULL,
    \`voided_at\` datetime(3) NULL,
    \`voided_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`void_reason\` varchar(2000) NULL,
    INDEX \`ix_field_test_sampled\` (\`site_id\`, \`sampled_at\`),
    INDEX \`ix_field_test_chain\` (\`site_id\`, \`chain_id\`),
    INDEX \`ix_field_test_place\` (\`site_id\`, \`lift\`, \`cell\`),
    UNIQUE INDEX \`uq_field_test_seq\` (\`site_id\`, \`seq\`),
    UNIQUE INDEX \`uq_field_test_number\` (\`site_id\`, \`number\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`test_mark\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`test_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`lift\` int NOT NULL,
    \`kind\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    INDEX \`ix_test_mark_place\` (\`site_id\`, \`lift\`, \`cell\`),
    PRIMARY KEY (\`site_id\`, \`test_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`stake\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`label\` varchar(12) NOT NULL,
    \`lot_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`u\` bigint NOT NULL,
    \`v\` bigint NOT NULL,
    \`easting\` double NOT NULL,
    \`northing\` double NOT NULL,
    \`drawn_at\` datetime(3) NOT NULL,
    \`drawn_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`retired_at\` datetime(3) NULL,
    \`retired_by\` varchar(200) NULL,
    INDEX \`ix_stake_lot\` (\`site_id\`, \`lot_id\`),
    UNIQUE INDEX \`uq_stake_seq\` (\`site_id\`, \`seq\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`field_test\`
    ADD CONSTRAINT \`fk_field_test_curve\` FOREIGN KEY (\`site_id\`, \`curve_id\`)
    REFERENCES \`reference_curve\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`field_test\`
    ADD CONSTRAINT \`fk_field_test_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`test_mark\`
    ADD CONSTRAINT \`fk_test_mark_test\` FOREIGN KEY (\`site_id\`, \`test_id\`)
    REFERENCES \`field_test\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`stake\`
    ADD CONSTRAINT \`fk_stake_lot\` FOREIGN KEY (\`site_id\`, \`lot_id\`)
    REFERENCES \`lot\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]

const DOWN = [
  'DROP TABLE `stake`',
  'DROP TABLE `test_mark`',
  'DROP TABLE `field_test`',
]
