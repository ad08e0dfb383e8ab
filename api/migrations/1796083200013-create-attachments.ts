import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Photos and documents of records; what they hold is in the object store. */
export class CreateAttachments1796083200013 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE \`attachment\` (
      \`created_at\` datetime(3) NOT NULL,
      \`updated_at\` datetime(3) NOT NULL,
      \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`subject_type\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`subject_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`kind\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`file_name\` varchar(120) NOT NULL,
      \`content_type\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`bytes\` int NOT NULL,
      \`sha256\` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`width\` int NULL,
      \`height\` int NULL,
      \`caption\` varchar(200) NOT NULL,
      \`added_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`added_at\` datetime(3) NOT NULL,
      \`taken_at\` datetime(3) NOT NULL,
      \`taken_from\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`object_key\` varchar(128) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`thumbnail_key\` varchar(128) CHARACTER SET ascii COLLATE ascii_bin NULL,
      \`withdrawn_at\` datetime(3) NULL,
      \`withdrawn_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
      \`withdrawal_reason\` varchar(2000) NULL,
      INDEX \`ix_attachment_subject\` (\`site_id\`, \`subject_type\`, \`subject_id\`),
      PRIMARY KEY (\`site_id\`, \`id\`)
    ) ENGINE=InnoDB`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `attachment`')
  }
}
