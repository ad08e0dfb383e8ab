import { In } from 'typeorm'
import type { Deps } from '#api/deps.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { ROLE_LABELS } from '#shared/policies/role.ts'
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#seed/demo/demo-people.ts'

/** Fills an empty database with the demo; a database with anybody in it is left alone. */
export async function seedDemoWhenEmpty(deps: Deps, say: (line: string) => void): Promise<void> {
  if (await deps.dataSource.manager.exists(UserEntity)) return
  say('Making the demo site, six weeks of work: about half a minute, this once')
  const { seedDemo } = await import('#seed/demo.ts')
  await seedDemo(deps)
}

/** The demo's accounts as lines to print, those that are in this database. */
export async function demoAccounts({ dataSource }: Deps): Promise<string> {
  const known = await dataSource.manager.findBy(UserEntity, { email: In(DEMO_PEOPLE.map((person) => person.email)) })
  const emails = new Set(known.map((user) => user.email))
  const lines = DEMO_PEOPLE.filter((person) => emails.has(person.email)).map((person) => `  ${person.email.padEnd(24)} ${ROLE_LABELS[person.role]}\n`)
  return lines.length === 0 ? '' : `Demo accounts, password ${DEMO_PASSWORD}:\n${lines.join('')}`
}
