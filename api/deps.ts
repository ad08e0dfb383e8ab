import type { Logger } from 'pino'
import type { DataSource } from 'typeorm'
import type { Clock } from '#api/clock.ts'
import type { Env } from '#api/env.ts'
import type { ObjectStore } from '#api/files/object-store.ts'
import type { Publisher } from '#api/realtime/publish.ts'

/** What a write needs: the database, the clock, and who is told afterwards. */
export interface WriteDeps {
  readonly dataSource: DataSource
  readonly clock: Clock
  readonly publisher: Publisher
}

/** What the application is made of. */
export interface Deps extends WriteDeps {
  readonly env: Env
  readonly logger: Logger
  /** where photos and documents are kept */
  readonly objects: ObjectStore
}
