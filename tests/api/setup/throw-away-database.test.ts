import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { setTimeout as sleep } from 'node:timers/promises'
import mysql from 'mysql2/promise'
import { expect, test } from 'vitest'
import { testDatabaseUrl } from '#tests/setup/test-database.ts'

const OWNER = `
  const { startThrowAwayDatabase } = await import('#api/setup/throw-away-database.mjs')
  const database = await startThrowAwayDatabase()
  console.log(database.adminUrl)
  setInterval(() => undefined, 1000)
`

async function isReachable(url: string): Promise<boolean> {
  try {
    await (await mysql.createConnection(url)).end()
    return true
  } catch {
    return false
  }
}

test('a throw-away database ends by itself when the run it served is killed', async () => {
  const owner = spawn(process.execPath, ['--input-type=module', '-e', OWNER])
  const [line] = (await once(owner.stdout, 'data')) as [Buffer]
  const url = line.toString().trim()
  expect(await isReachable(url)).toBe(true)
  owner.kill('SIGKILL')
  const deadline = Date.now() + 15_000
  while ((await isReachable(url)) && Date.now() < deadline) await sleep(100)
  expect(await isReachable(url)).toBe(false)
})

test('each worker has one database of its own, made on first use', async () => {
  const url = await testDatabaseUrl()
  expect(await testDatabaseUrl()).toBe(url)
  expect(new URL(url).pathname).toBe(`/hardpan_test_${process.env.VITEST_POOL_ID}`)
  const connection = await mysql.createConnection(url)
  await connection.query('CREATE TEMPORARY TABLE scratch (id INT)')
  await connection.end()
})

test('the account of the tests may touch only databases of tests', async () => {
  const connection = await mysql.createConnection(await testDatabaseUrl())
  await expect(connection.query('CREATE DATABASE hardpan')).rejects.toMatchObject({ code: 'ER_DBACCESS_DENIED_ERROR' })
  await connection.end()
})
