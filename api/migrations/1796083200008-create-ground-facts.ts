import type { MigrationInterface, QueryRunner } from 'typeorm'

/** The facts of the ground: fill, rework, releases, inspections, dispositions. */
export class CreateGroundFacts1796083200008 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const UP = [
  `CREATE TABLE \`placement\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`material_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`happened_at\` datetime(3) NOT NULL,
    \`recorded_at\` datetime(3) NOT NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`loads\` int NOT NULL,
    \`load_volume_cm3\` bigint NOT NULL,
    \`loose_thickness_um\` int NULL,
    \`machine\` varchar(200) NOT NULL,
    \`passes\` int NULL,
    \`remarks\` varchar(2000) NOT NULL,
    \`geometry_cm3\` bigint NOT NULL,
    \`loads_cm3\` bigint NOT NULL,
    \`driving_cm3\` bigint NOT NULL,
    \`cover_reason\` varchar(2000) NULL,
    \`voided_at\` datetime(3) NULL,
    \`voided_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`void_reason\` varchar(2000) NULL,
    INDEX \`ix_placement_happened\` (\`site_id\`, \`happened_at\`),
    UNIQUE INDEX \`uq_placement_seq\` (\`site_id\`, \`seq\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`placement_cell\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`placement_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`lift\` int NOT NULL,
    \`lot_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`quarters\` tinyint UNSIGNED NOT NULL,
    \`volume_cm3\` bigint NOT NULL,
    \`covered_early\` tinyint NOT NULL,
    INDEX \`ix_placement_cell_place\` (\`site_id\`, \`lift\`, \`cell\`),
    INDEX \`ix_placement_cell_lot\` (\`site_id\`, \`lot_id\`),
    PRIMARY KEY (\`site_id\`, \`placement_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`rework_order\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`cause_test_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`state\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`actions\` json NOT NULL,
    \`headline\` varchar(200) NOT NULL,
    \`opened_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`opened_at\` datetime(3) NOT NULL,
    \`assigned_to\` varchar(80) NULL,
    \`working_since\` datetime(3) NULL,
    \`reported_at\` datetime(3) NULL,
    \`closed_at\` datetime(3) NULL,
    \`retest_points\` json NOT NULL,
    INDEX \`ix_rework_order_place\` (\`site_id\`, \`zone_id\`, \`lift\`),
    UNIQUE INDEX \`uq_rework_order_seq\` (\`site_id\`, \`seq\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`rework_cell\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`order_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`left_at\` datetime(3) NULL,
    INDEX \`ix_rework_cell_cell\` (\`site_id\`, \`cell\`),
    PRIMARY KEY (\`site_id\`, \`order_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`rework_step\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`order_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`position\` int NOT NULL,
    \`kind\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`happened_at\` datetime(3) NOT NULL,
    \`by_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`text\` varchar(2000) NOT NULL,
    \`details\` json NOT NULL,
    UNIQUE INDEX \`uq_rework_step_position\` (\`site_id\`, \`order_id\`, \`position\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`release_record\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`status\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`hold\` tinyint NOT NULL,
    \`happened_at\` datetime(3) NOT NULL,
    \`asked_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`issued_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`issued_at\` datetime(3) NULL,
    \`accepted_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`accepted_at\` datetime(3) NULL,
    \`declined_reason\` varchar(2000) NULL,
    \`override_reason\` varchar(2000) NULL,
    \`remarks\` varchar(2000) NOT NULL,
    INDEX \`ix_release_place\` (\`site_id\`, \`zone_id\`, \`lift\`),
    UNIQUE INDEX \`uq_release_seq\` (\`site_id\`, \`seq\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`release_cell\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`release_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`lift\` int NOT NULL,
    \`volume_cm3\` bigint NOT NULL,
    \`pairs\` json NOT NULL,
    \`revoked_at\` datetime(3) NULL,
    \`revoked_reason\` varchar(400) NULL,
    INDEX \`ix_release_cell_place\` (\`site_id\`, \`lift\`, \`cell\`),
    PRIMARY KEY (\`site_id\`, \`release_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`inspection\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`happened_at\` datetime(3) NOT NULL,
    \`recorded_at\` datetime(3) NOT NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`method\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`outcome\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`remarks\` varchar(2000) NOT NULL,
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`inspection_cell\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`inspection_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    INDEX \`ix_inspection_cell_cell\` (\`site_id\`, \`cell\`),
    PRIMARY KEY (\`site_id\`, \`inspection_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`disposition\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lift\` int NOT NULL,
    \`reason\` varchar(2000) NOT NULL,
    \`engineer\` varchar(80) NOT NULL,
    \`document\` varchar(200) NOT NULL,
    \`recorded_at\` datetime(3) NOT NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`disposition_cell\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`disposition_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`lift\` int NOT NULL,
    INDEX \`ix_disposition_cell_place\` (\`site_id\`, \`lift\`, \`cell\`),
    PRIMARY KEY (\`site_id\`, \`disposition_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`placement\`
    ADD CONSTRAINT \`fk_placement_material\` FOREIGN KEY (\`site_id\`, \`material_id\`)
    REFERENCES \`borrow_material\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`placement\`
    ADD CONSTRAINT \`fk_placement_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`placement_cell\`
    ADD CONSTRAINT \`fk_placement_cell_lot\` FOREIGN KEY (\`site_id\`, \`lot_id\`)
    REFERENCES \`lot\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`placement_cell\`
    ADD CONSTRAINT \`fk_placement_cell_placement\` FOREIGN KEY (\`site_id\`, \`placement_id\`)
    REFERENCES \`placement\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`rework_order\`
    ADD CONSTRAINT \`fk_rework_order_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`rework_cell\`
    ADD CONSTRAINT \`fk_rework_cell_order\` FOREIGN KEY (\`site_id\`, \`order_id\`)
    REFERENCES \`rework_order\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`rework_step\`
    ADD CONSTRAINT \`fk_rework_step_order\` FOREIGN KEY (\`site_id\`, \`order_id\`)
    REFERENCES \`rework_order\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`release_record\`
    ADD CONSTRAINT \`fk_release_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`release_cell\`
    ADD CONSTRAINT \`fk_release_cell_release\` FOREIGN KEY (\`site_id\`, \`release_id\`)
    REFERENCES \`release_record\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`inspection\`
    ADD CONSTRAINT \`fk_inspection_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`inspection_cell\`
    ADD CONSTRAINT \`fk_inspection_cell_inspection\` FOREIGN KEY (\`site_id\`, \`inspection_id\`)
    REFERENCES \`inspection\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`disposition\`
    ADD CONSTRAINT \`fk_disposition_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`disposition_cell\`
    ADD CONSTRAINT \`fk_disposition_cell_disposition\` FOREIGN KEY (\`site_id\`, \`disposition_id\`)
    REFERENCES \`disposition\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]

const DOWN = [
  'DROP TABLE `disposition_cell`',
  'DROP TABLE `disposition`',
  'DROP TABLE `inspection_cell`',
  'DROP TABLE `inspection`',
  'DROP TABLE `release_cell`',
  'DROP TABLE `release_record`',
  'DROP TABLE `rework_step`',
  'DROP TABLE `rework_cell`',
  'DROP TABLE `rework_order`',
  'DROP TABLE `placement_cell`',
  'DROP TABLE `placement`',
]
