import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Saved views of the register of tests, and the indexes it is filtered and counted by. */
export class CreateSavedViews1796083200017 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of UP) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of DOWN) await runner.query(statement)
  }
}

const UP = [
  `CREATE TABLE \`saved_view\` (
    \`created_at\` datetime(3) NOT NULL,
    \`updated_at\` datetime(3) NOT NULL,
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`author_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`name\` varchar(80) NOT NULL,
    \`shared\` tinyint NOT NULL,
    \`content\` json NOT NULL,
    UNIQUE INDEX \`uq_saved_view_name\` (\`site_id\`, \`author_id\`, \`name\`),
    PRIMARY KEY (\`site_id\`, \`id\`)
  ) ENGINE=InnoDB`,
  `CREATE TABLE \`default_view\` (
    \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`user_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    \`view_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
    PRIMARY KEY (\`site_id\`, \`user_id\`)
  ) ENGINE=InnoDB`,
  `ALTER TABLE \`saved_view\`
    ADD CONSTRAINT \`fk_saved_view_site\` FOREIGN KEY (\`site_id\`)
    REFERENCES \`site\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`saved_view\`
    ADD CONSTRAINT \`fk_saved_view_author\` FOREIGN KEY (\`author_id\`)
    REFERENCES \`user\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`default_view\`
    ADD CONSTRAINT \`fk_default_view_view\` FOREIGN KEY (\`site_id\`, \`view_id\`)
    REFERENCES \`saved_view\`(\`site_id\`,\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  `ALTER TABLE \`default_view\`
    ADD CONSTRAINT \`fk_default_view_user\` FOREIGN KEY (\`user_id\`)
    REFERENCES \`user\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
  'CREATE INDEX `ix_field_test_outcome` ON `field_test` (`site_id`, `outcome`)',
  'CREATE INDEX `ix_field_test_recorder` ON `field_test` (`site_id`, `recorded_by`)',
]

const DOWN = [
  'DROP INDEX `ix_field_test_recorder` ON `field_test`',
  'DROP INDEX `ix_field_test_outcome` ON `field_test`',
  'DROP TABLE `default_view`',
  'DROP TABLE `saved_view`',
]
