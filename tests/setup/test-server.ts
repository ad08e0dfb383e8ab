import mysql from 'mysql2/promise'
import { startThrowAwayDatabase, TEST_DATABASE_PREFIX } from '#api/setup/throw-away-database.mjs'

export interface TestServer {
  /** Account that may create, use and drop databases named hardpan_test_…, and no other. */
  adminUrl: string
  stop: () => Promise<void>
}

/** The database server npm test has started (TEST_DATABASE_ADMIN_URL), or one for this run of vitest alone. */
export async function openTestServer(): Promise<TestServer> {
  const adminUrl = process.env.TEST_DATABASE_ADMIN_URL
  if (adminUrl) return { adminUrl, stop: () => Promise.resolve() }
  return startThrowAwayDatabase()
}

/** Makes a database when it is missing and returns its address. */
export async function createDatabase(adminUrl: string, name: string): Promise<string> {
  await execute(adminUrl, [`CREATE DATABASE IF NOT EXISTS \`${name}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`])
  return urlOf(adminUrl, name)
}

/** Drops what an earlier run left on the server, so that no test meets an old schema. */
export async function dropDatabases(adminUrl: string, nameStart: string): Promise<void> {
  const connection = await mysql.createConnection(adminUrl)
  try {
    const [rows] = await connection.query<mysql.RowDataPacket[]>('SELECT schema_name AS name FROM information_schema.schemata')
    const names = rows.map((row) => String(row.name)).filter((name) => name.startsWith(nameStart))
    for (const name of names) await connection.query(`DROP DATABASE \`${name}\``)
  } finally {
    await connection.end()
  }
}

/** Name of the database of one vitest worker. */
export function workerDatabaseName(poolId: string): string {
  return `${TEST_DATABASE_PREFIX}${poolId}`
}

async function execute(adminUrl: string, statements: string[]): Promise<void> {
  const connection = await mysql.createConnection(adminUrl)
  try {
    for (const statement of statements) await connection.query(statement)
  } finally {
    await connection.end()
  }
}

function urlOf(adminUrl: string, name: string): string {
  const url = new URL(adminUrl)
  url.pathname = `/${name}`
  return url.href
}
