import type { MigrationInterface, QueryRunner } from 'typeorm'

export class CreateSiteHeads1796083200004 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE \`site_head\` (
      \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`revision\` bigint NOT NULL,
      \`chain_length\` bigint NOT NULL,
      \`chain_head\` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`next_test\` int NOT NULL,
      \`next_order\` int NOT NULL,
      \`next_lot\` int NOT NULL,
      \`next_stake\` int NOT NULL,
      \`next_release\` int NOT NULL,
      \`next_placement\` int NOT NULL,
      PRIMARY KEY (\`site_id\`),
      CONSTRAINT \`fk_site_head_site\` FOREIGN KEY (\`site_id\`) REFERENCES \`site\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION
    ) ENGINE=InnoDB`)
    await runner.query(`CREATE TABLE \`patch\` (
      \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`revision\` bigint NOT NULL,
      \`body\` mediumblob NOT NULL,
      \`recorded_at\` datetime(3) NOT NULL,
      PRIMARY KEY (\`site_id\`, \`revision\`),
      CONSTRAINT \`fk_patch_site\` FOREIGN KEY (\`site_id\`) REFERENCES \`site\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION
    ) ENGINE=InnoDB`)
    await runner.query(`CREATE TABLE \`request_record\` (
      \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`hash\` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`answer\` longtext NOT NULL,
      \`recorded_at\` datetime(3) NOT NULL,
      PRIMARY KEY (\`site_id\`, \`id\`),
      CONSTRAINT \`fk_request_record_site\` FOREIGN KEY (\`site_id\`) REFERENCES \`site\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION
    ) ENGINE=InnoDB`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `request_record`')
    await runner.query('DROP TABLE `patch`')
    await runner.query('DROP TABLE `site_head`')
  }
}
