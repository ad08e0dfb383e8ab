import { Column, Entity, PrimaryColumn } from 'typeorm'

/** The session store's own table; declared here so that migrations and the drift check know it. */
@Entity('session')
export class SessionEntity {
  @PrimaryColumn('varchar', { name: 'session_id', length: 128, collation: 'utf8mb4_bin' })
  sessionId!: string

  /** epoch seconds */
  @Column({ type: 'int', name: 'expires', unsigned: true })
  expires!: number

  @Column({ type: 'mediumtext', name: 'data', nullable: true, collation: 'utf8mb4_bin' })
  data!: string | null
}
