import type { MigrationInterface, QueryRunner } from 'typeorm'

/** The plan of a site: zones, specifications, cells, borrow materials and their curves. */
export class CreateSitePlan1796083200006 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const UP = [
  `CREATE TABLE \`zone\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`position\` int NOT NULL,
    \`name\` varchar(80) NOT NULL,
    \`short_name\` varchar(16) NOT NULL,
    \`purpose\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`ring\` json NOT NULL,
    \`lift_plan\` json NOT NULL,
    \`design\` json NOT NULL,
    \`holds\` json NOT NULL,
    \`volume_basis\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`lot_basis\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`min_base_um\` bigint NOT NULL,
    \`max_design_um\` bigint NOT NULL,
    \`design_cm3\` bigint NOT NULL,
    UNIQUE INDEX \`uq_zone_position\` (\`site_id\`, \`position\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`specification\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`version\` int NOT NULL,
    \`body\` json NOT NULL,
    \`created_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    UNIQUE INDEX \`uq_specification_version\` (\`site_id\`, \`zone_id\`, \`version\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`cell\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`cell\` int NOT NULL,
    \`grid_column\` int NOT NULL,
    \`grid_row\` int NOT NULL,
    \`zone_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`zone_index\` int NOT NULL,
    \`area_mm2\` bigint NOT NULL,
    \`centroid_u\` bigint NOT NULL,
    \`centroid_v\` bigint NOT NULL,
    \`base_um\` bigint NOT NULL,
    \`design_um\` bigint NOT NULL,
    \`surface_lift\` int NOT NULL,
    \`ready\` tinyint NOT NULL,
    \`next_lift\` int NULL,
    \`next_cm3\` bigint NOT NULL,
    \`block_lift\` int NULL,
    \`block_reason\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NULL,
    INDEX \`ix_cell_zone\` (\`site_id\`, \`zone_id\`),
    PRIMARY KEY (\`site_id\`, \`cell\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`borrow_material\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`name\` varchar(80) NOT NULL,
    \`source\` varchar(200) NOT NULL,
    \`classification\` varchar(200) NOT NULL,
    \`swell_percent\` decimal(6,2) NOT NULL,
    \`shrink_percent\` decimal(6,2) NOT NULL,
    UNIQUE INDEX \`uq_borrow_material_name\` (\`site_id\`, \`name\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`reference_curve\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`code\` varchar(80) NOT NULL,
    \`material_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`method\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`procedure_letter\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`points\` json NOT NULL,
    \`gs\` decimal(6,3) NOT NULL,
    \`gs_measured\` tinyint NOT NULL,
    \`reported\` json NULL,
    \`sampled_at\` datetime(3) NOT NULL,
    \`status\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`max_dry_density\` double NULL,
    \`optimum_moisture\` double NULL,
    \`pair_from\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`approved_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`approved_at\` datetime(3) NULL,
    UNIQUE INDEX \`uq_reference_curve_code\` (\`site_id\`, \`code\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`zone\`
    ADD CONSTRAINT \`fk_zone_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`specification\`
    ADD CONSTRAINT \`fk_specification_zone\` FOREIGN KEY (\`site_id\`, \`zone_id\`)
    REFERENCES \`zone\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`cell\`
    ADD CONSTRAINT \`fk_cell_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`borrow_material\`
    ADD CONSTRAINT \`fk_borrow_material_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`reference_curve\`
    ADD CONSTRAINT \`fk_reference_curve_material\` FOREIGN KEY (\`site_id\`, \`material_id\`)
    REFERENCES \`borrow_material\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]

const DOWN = [
  'DROP TABLE `reference_curve`',
  'DROP TABLE `borrow_material`',
  'DROP TABLE `cell`',
  'DROP TABLE `specification`',
  'DROP TABLE `zone`',
]
