import type { Deps } from '#api/deps.ts'
import { UserEntity } from '#api/entities/user.entity.ts'

/** Fills an empty database with the demo; a database with anybody in it is left alone. @returns true when it was filled */
export async function seedDemoWhenEmpty(deps: Deps): Promise<boolean> {
  if (await deps.dataSource.manager.exists(UserEntity)) return false
  const { seedDemo } = await import('#seed/demo.ts')
  await seedDemo(deps)
  return true
}
