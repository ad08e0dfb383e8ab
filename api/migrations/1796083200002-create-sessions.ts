import type { MigrationInterface, QueryRunner } from 'typeorm'

export class CreateSessions1796083200002 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE \`session\` (
      \`session_id\` varchar(128) COLLATE utf8mb4_bin NOT NULL,
      \`expires\` int UNSIGNED NOT NULL,
      \`data\` mediumtext COLLATE utf8mb4_bin NULL,
      PRIMARY KEY (\`session_id\`)
    ) ENGINE=InnoDB`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `session`')
  }
}
