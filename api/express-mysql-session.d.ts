declare module 'express-mysql-session' {
  import type session from 'express-session'
  import type { Pool } from 'mysql2/promise'

  interface Options {
    createDatabaseTable?: boolean
    clearExpired?: boolean
    endConnectionOnClose?: boolean
    schema?: { tableName?: string }
  }

  class MySQLStore extends session.Store {
    constructor(options: Options, pool: Pool)
    close(): Promise<void>
    onReady(): Promise<void>
  }

  export default function createStoreClass(module: typeof session): typeof MySQLStore
}
