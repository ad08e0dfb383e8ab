import { existsSync, mkdirSync, statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import mysql from 'mysql2/promise'
import { expect, onTestFinished, test } from 'vitest'
import { databaseUrl, grantAccess } from '#api/setup/database-access.mjs'
import { cannotOpenMessage, filesOf, findRunning, startMariadb, stopMariadb } from '#api/setup/mariadb.mjs'
import { isAlive } from '#api/setup/processes.mjs'
import { temporaryFolder } from './temporary-folder.ts'

type Instance = Awaited<ReturnType<typeof startMariadb>>

async function start(folder: string): Promise<Instance> {
  const instance = await startMariadb(folder, { throwAway: true })
  onTestFinished(() => stopMariadb(instance))
  return instance
}

async function attempt(url: string, sql: string): Promise<unknown> {
  const connection = await mysql.createConnection(url)
  try {
    return (await connection.query(sql))[0]
  } catch (error) {
    return (error as { code?: string }).code
  } finally {
    await connection.end()
  }
}

test('the private server starts, keeps what was written, and ends without leaving a socket', async () => {
  const folder = temporaryFolder()
  const access = { password: 'abc', database: 'hardpan', grantOn: 'hardpan' }
  const first = await startMariadb(folder, { throwAway: true })
  await grantAccess(first, access)
  await attempt(databaseUrl(first, 'abc', 'hardpan'), 'CREATE TABLE kept AS SELECT 7 AS answer')
  expect(statSync(first.runFolder).mode & 0o777).toBe(0o700)
  await stopMariadb(first)
  expect([isAlive(first.pid), existsSync(first.runFolder), findRunning(folder)]).toEqual([false, false, null])

  const second = await start(folder)
  await grantAccess(second, access)
  expect(await attempt(databaseUrl(second, 'abc', 'hardpan'), 'SELECT answer FROM kept')).toEqual([{ answer: 7 }])
})

test('the application may do all in its own database and nothing outside it', async () => {
  const folder = temporaryFolder()
  const instance = await start(folder)
  await grantAccess(instance, { password: 'abc', database: 'hardpan', grantOn: 'hardpan' })
  const url = databaseUrl(instance, 'abc', 'hardpan')
  const readsOnly = "CREATE TRIGGER refuse BEFORE UPDATE ON event FOR EACH ROW SIGNAL SQLSTATE '45000'"
  expect(await attempt(url, 'CREATE TABLE event (id INT)')).toMatchObject({ warningStatus: 0 })
  expect(await attempt(url, readsOnly)).toMatchObject({ warningStatus: 0 })
  expect(await attempt(url, `SELECT 1 INTO OUTFILE '${folder}/stolen'`)).toBe('ER_SPECIFIC_ACCESS_DENIED_ERROR')
  expect(await attempt(url, 'SELECT * FROM mysql.global_priv')).toBe('ER_TABLEACCESS_DENIED_ERROR')
  expect(await attempt(url, 'CREATE DATABASE another')).toBe('ER_DBACCESS_DENIED_ERROR')
  expect(await attempt(url, 'SELECT @@time_zone AS zone, @@character_set_server AS text')).toEqual([{ zone: '+00:00', text: 'utf8mb4' }])
})

test('nobody gets in as the administrator over the network', async () => {
  const instance = await start(temporaryFolder())
  await grantAccess(instance, { password: 'abc', grantOn: 'hardpan' })
  await expect(mysql.createConnection(`mysql://root@127.0.0.1:${instance.port}/`)).rejects.toMatchObject({ errno: 1698 })
})

test('a server an earlier run left running is adopted, not started twice', async () => {
  const folder = temporaryFolder()
  const left = await start(folder)
  expect(await startMariadb(folder, { throwAway: true })).toEqual(left)
})

test('a record of a server that is gone does not stand in the way', async () => {
  const folder = temporaryFolder()
  const files = filesOf(folder)
  writeFileSync(files.record, JSON.stringify({ port: 1, socket: '/nowhere', runFolder: '/nowhere' }))
  // The pid is alive, but it is this test and no database of that folder.
  writeFileSync(files.pid, String(process.pid))
  const instance = await start(folder)
  expect(instance.pid).not.toBe(process.pid)
  expect(isAlive(process.pid)).toBe(true)
})

test('a data directory that is not whole is refused with what to do, and left as it is', async () => {
  const folder = temporaryFolder()
  mkdirSync(filesOf(folder).data)
  await expect(startMariadb(folder)).rejects.toThrow(/is not a whole database: its own tables are missing\.\nTo begin with a fresh demo, move it away: mv /)
  expect(existsSync(filesOf(folder).pid)).toBe(false)
})

test('a data directory that MariaDB cannot open is refused with its reason, and nothing is left running', async () => {
  const folder = temporaryFolder()
  await stopMariadb(await startMariadb(folder, { throwAway: true }))
  writeFileSync(path.join(filesOf(folder).data, 'ibdata1'), 'not a table space')
  const refusal = await startMariadb(folder).then(() => '', (error: Error) => error.message)
  expect(refusal).toMatch(/^The database in .*\/mariadb cannot be opened:\n {2}InnoDB: .*ibdata1/)
  expect(refusal).toContain(`The whole log is ${filesOf(folder).log}.`)
  expect(findRunning(folder)).toBe(null)
})

test('a database that another server has open is said to be in use, not broken', () => {
  const log = '2026-12-01 5:00:00 0 [ERROR] InnoDB: Unable to lock ./ibdata1 error: 11\n'
  expect(cannotOpenMessage('/data', log)).toContain('Another MariaDB server has it open: stop that one, then start again.')
})
