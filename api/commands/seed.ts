import { pino } from 'pino'
import { createClock } from '#api/clock.ts'
import { createDataSource } from '#api/data-source.ts'
import { readEnv } from '#api/env.ts'
import { createObjectStore } from '#api/files/object-store.ts'
import { silentPublisher } from '#api/realtime/publish.ts'
import { seedDemoWhenEmpty } from '#api/seed-demo-when-empty.ts'

// Fills an empty database with the demo site; one with anybody in it is left alone.

const env = readEnv({ SESSION_SECRET: 'not used by this command, but asked for', ...process.env })
const dataSource = createDataSource(env.DATABASE_URL)
await dataSource.initialize()
try {
  await dataSource.runMigrations()
  const clock = createClock(env.DEMO_NOW === undefined ? undefined : new Date(env.DEMO_NOW))
  const deps = { env, dataSource, clock, publisher: silentPublisher, logger: pino({ level: env.LOG_LEVEL }), objects: createObjectStore(env) }
  await seedDemoWhenEmpty(deps, (line) => process.stdout.write(`${line}\n`))
} finally {
  await dataSource.destroy()
}
