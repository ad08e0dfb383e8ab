import type { AddressInfo } from 'node:net'
import { pino } from 'pino'
import { createClock } from '#api/clock.ts'
import { createDataSource } from '#api/data-source.ts'
import { readEnv } from '#api/env.ts'
import { demoAccounts, seedDemoWhenEmpty } from '#api/seed-demo-when-empty.ts'
import { createServer } from '#api/server.ts'

const STOP_WITHIN_MS = 10_000

const env = readEnv(process.env)
const logger = pino({ level: env.LOG_LEVEL })
const clock = createClock(env.DEMO_NOW === undefined ? undefined : new Date(env.DEMO_NOW))
const dataSource = createDataSource(env.DATABASE_URL)
await dataSource.initialize()
await dataSource.runMigrations()
const server = createServer({ env, dataSource, clock, logger })
if (!server.deps.objects.configured) logger.warn('S3_ENDPOINT is not set: photos and documents can be neither kept nor shown')
if (env.SEED_DEMO === '1') await seedDemoWhenEmpty(server.deps, (line) => process.stdout.write(`${line}\n`))

let stopping = false

async function stop(): Promise<void> {
  if (stopping) return
  stopping = true
  setTimeout(() => process.exit(1), STOP_WITHIN_MS).unref()
  await server.close()
  await dataSource.destroy()
  process.exit(0)
}

process.on('SIGTERM', () => void stop())
process.on('SIGINT', () => void stop())

server.http.once('error', (error) => {
  logger.fatal({ err: error }, 'Hardpan cannot listen on its port')
  process.exitCode = 1
  void dataSource.destroy().finally(() => process.exit(1))
})
server.http.listen(env.PORT, env.HOST, () => {
  const { port } = server.http.address() as AddressInfo
  const host = env.HOST.includes(':') ? `[${env.HOST}]` : env.HOST
  process.stdout.write(`Hardpan: http://${host}:${port}\n`)
  if (env.SEED_DEMO === '1') void demoAccounts(server.deps).then((lines) => process.stdout.write(lines))
})
