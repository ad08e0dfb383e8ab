import { existsSync } from 'node:fs'
import type { Deps } from '#api/deps.ts'
import { UserEntity } from '#api/entities/user.entity.ts'

interface DemoSeed {
  readonly seedDemo: (deps: Deps) => Promise<void>
}

const DEMO_SEED = '#seed/demo.ts'

/** Fills an empty database with the demo site; a database with anybody in it is left alone. */
export async function seedDemoWhenEmpty(deps: Deps): Promise<void> {
  if (await deps.dataSource.manager.exists(UserEntity)) return
  if (!existsSync(new URL('../seed/demo.ts', import.meta.url))) return
  const { seedDemo } = (await import(DEMO_SEED)) as DemoSeed
  await seedDemo(deps)
}
