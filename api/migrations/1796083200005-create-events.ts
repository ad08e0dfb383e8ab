import type { MigrationInterface, QueryRunner } from 'typeorm'

export class CreateEvents1796083200005 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE \`event\` (
      \`site_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`seq\` bigint NOT NULL,
      \`revision\` bigint NOT NULL,
      \`actor_id\` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`actor_name\` varchar(120) NOT NULL,
      \`verb\` varchar(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`subject_type\` varchar(32) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`subject_id\` varchar(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`payload\` longtext NOT NULL,
      \`happened_at\` datetime(3) NOT NULL,
      \`recorded_at\` datetime(3) NOT NULL,
      \`previous\` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      \`hash\` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      PRIMARY KEY (\`site_id\`, \`seq\`),
      INDEX \`ix_event_subject\` (\`site_id\`, \`subject_type\`, \`subject_id\`, \`seq\`),
      CONSTRAINT \`fk_event_site\` FOREIGN KEY (\`site_id\`) REFERENCES \`site\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION,
      CONSTRAINT \`fk_event_actor\` FOREIGN KEY (\`actor_id\`) REFERENCES \`user\` (\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION
    ) ENGINE=InnoDB`)
    await runner.query(`CREATE TRIGGER \`event_refuses_update\` BEFORE UPDATE ON \`event\` FOR EACH ROW
      SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The audit trail is only added to: an event is never changed'`)
    await runner.query(`CREATE TRIGGER \`event_refuses_delete\` BEFORE DELETE ON \`event\` FOR EACH ROW
      SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The audit trail is only added to: an event is never removed'`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `event`')
  }
}
