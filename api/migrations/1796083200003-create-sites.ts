import type { MigrationInterface, QueryRunner } from 'typeorm'

export class CreateSites1796083200003 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE \`site\` (
      \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`name\` varchar(120) NOT NULL,
      \`subtitle\` varchar(200) NOT NULL,
      \`crs_code\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`unit_system\` varchar(2) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`time_zone\` varchar(64) NOT NULL,
      \`day_cut_hour\` tinyint UNSIGNED NOT NULL,
      \`grid\` json NOT NULL,
      \`boundary\` json NOT NULL,
      \`rounding\` json NOT NULL,
      \`water_density\` double NOT NULL,
      \`combined_factor\` double NOT NULL,
      \`vertical_datum\` varchar(120) NOT NULL,
      \`created_by\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`created_at\` datetime(3) NOT NULL,
      \`updated_at\` datetime(3) NOT NULL,
      PRIMARY KEY (\`id\`),
      CONSTRAINT \`fk_site_created_by\` FOREIGN KEY (\`created_by\`) REFERENCES \`user\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION
    ) ENGINE=InnoDB`)
    await runner.query(`CREATE TABLE \`membership\` (
      \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`user_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`role\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`created_at\` datetime(3) NOT NULL,
      \`updated_at\` datetime(3) NOT NULL,
      PRIMARY KEY (\`site_id\`, \`user_id\`),
      INDEX \`ix_membership_user\` (\`user_id\`),
      CONSTRAINT \`fk_membership_site\` FOREIGN KEY (\`site_id\`) REFERENCES \`site\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION,
      CONSTRAINT \`fk_membership_user\` FOREIGN KEY (\`user_id\`) REFERENCES \`user\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION
    ) ENGINE=InnoDB`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `membership`')
    await runner.query('DROP TABLE `site`')
  }
}
