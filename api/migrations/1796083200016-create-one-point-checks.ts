import type { MigrationInterface, QueryRunner } from 'typeorm'

/** One specimen compacted beside the work, compared with the family of curves of its material. */
export class CreateOnePointChecks1796083200016 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `one_point_check`')
  }
}

const UP = [
  `CREATE TABLE \`one_point_check\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`seq\` int NOT NULL,
    \`material_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`curve_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`test_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`method\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`procedure_letter\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`sheet\` json NOT NULL,
    \`wet_density\` double NOT NULL,
    \`dry_density\` double NOT NULL,
    \`moisture\` double NOT NULL,
    \`result\` json NOT NULL,
    \`sampled_at\` datetime(3) NOT NULL,
    \`recorded_at\` datetime(3) NOT NULL,
    \`recorded_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`remarks\` varchar(2000) NOT NULL,
    \`voided_at\` datetime(3) NULL,
    \`voided_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
    \`void_reason\` varchar(2000) NULL,
    UNIQUE INDEX \`uq_one_point_check_seq\` (\`site_id\`, \`seq\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`one_point_check\`
    ADD CONSTRAINT \`fk_one_point_check_material\` FOREIGN KEY (\`site_id\`, \`material_id\`)
    REFERENCES \`borrow_material\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`one_point_check\`
    ADD CONSTRAINT \`fk_one_point_check_curve\` FOREIGN KEY (\`site_id\`, \`curve_id\`)
    REFERENCES \`reference_curve\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`one_point_check\`
    ADD CONSTRAINT \`fk_one_point_check_test\` FOREIGN KEY (\`site_id\`, \`test_id\`)
    REFERENCES \`field_test\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
]
