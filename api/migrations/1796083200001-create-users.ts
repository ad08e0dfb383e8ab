import type { MigrationInterface, QueryRunner } from 'typeorm'

export class CreateUsers1796083200001 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE \`user\` (
      \`id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`email\` varchar(254) NOT NULL,
      \`name\` varchar(120) NOT NULL,
      \`password_hash\` varchar(255) NOT NULL,
      \`created_at\` datetime(3) NOT NULL,
      \`updated_at\` datetime(3) NOT NULL,
      PRIMARY KEY (\`id\`),
      UNIQUE INDEX \`uq_user_email\` (\`email\`)
    ) ENGINE=InnoDB`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `user`')
  }
}
