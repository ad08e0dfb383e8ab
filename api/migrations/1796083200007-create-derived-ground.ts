import type { MigrationInterface, QueryRunner } from 'typeorm'

/** What is derived from the facts: lots, layer states, totals, shares. */
export class CreateDerivedGround1796083200007 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const UP = [
  `CREATE TABLE \`lot\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`name\` varchar(80) NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`material_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`work_day\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`specification_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`merged_into\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`volume_cm3\` bigint NOT NULL,
    \`spoken_cm3\` bigint NOT NULL,
    \`area_mm2\` bigint NOT NULL,
    \`f_cm3\` bigint NOT NULL,
    \`required\` int NOT NULL,
    \`taken\` int NOT NULL,
    \`passing\` int NOT NULL,
    \`owed\` int NOT NULL,
    \`reruns\` int NOT NULL,
    \`to_stake\` int NOT NULL,
    \`standing\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    INDEX \`ix_lot_zone_lift\` (\`site_id\`, \`zone_id\`, \`lift\`),
    UNIQUE INDEX \`uq_lot_seq\` (\`site_id\`, \`seq\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`cell_lift\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`cell\` int NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`state\` tinyint UNSIGNED NOT NULL,
    \`flags\` tinyint UNSIGNED NOT NULL,
    \`lot_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`bottom_um\` bigint NOT NULL,
    \`top_um\` bigint NOT NULL,
    \`volume_cm3\` bigint NOT NULL,
    \`spoken_cm3\` bigint NOT NULL,
    \`naming_test_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    INDEX \`ix_cell_lift_lot\` (\`site_id\`, \`lot_id\`),
    INDEX \`ix_cell_lift_cell\` (\`site_id\`, \`cell\`),
    PRIMARY KEY (\`site_id\`, \`lift\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`lift_total\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`state\` int NOT NULL,
    \`cells\` int NOT NULL,
    \`cm3\` bigint NOT NULL,
    PRIMARY KEY (\`site_id\`, \`zone_id\`, \`lift\`, \`state\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`allocation\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lot_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`test_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`cm3\` bigint NOT NULL,
    \`frozen\` tinyint NOT NULL,
    \`far\` tinyint NOT NULL,
    INDEX \`ix_allocation_test\` (\`site_id\`, \`test_id\`),
    PRIMARY KEY (\`site_id\`, \`lot_id\`, \`test_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`lot\`
    ADD CONSTRAINT \`fk_lot_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`cell_lift\`
    ADD CONSTRAINT \`fk_cell_lift_cell\` FOREIGN KEY (\`site_id\`, \`cell\`)
    REFERENCES \`cell\`(\`site_id\`,\`cell\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`lift_total\`
    ADD CONSTRAINT \`fk_lift_total_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`allocation\`
    ADD CONSTRAINT \`fk_allocation_lot\` FOREIGN KEY (\`site_id\`, \`lot_id\`)
    REFERENCES \`lot\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]

const DOWN = [
  'DROP TABLE `allocation`',
  'DROP TABLE `lift_total`',
  'DROP TABLE `cell_lift`',
  'DROP TABLE `lot`',
]
