import type { EntityManager } from 'typeorm'
import { UserEntity } from '#api/entities/user.entity.ts'
import { hashPassword } from '#api/features/session/find-user-by-password.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Chance } from '#seed/demo/demo-random.ts'

/** The one password of every demo account; a demo is made only in a database of its own. */
export const DEMO_PASSWORD = 'alder-flats'

interface DemoPerson {
  readonly role: Role
  readonly name: string
  readonly email: string
}

/** Invented people, one for each role. */
export const DEMO_PEOPLE: readonly DemoPerson[] = [
  { role: 'qc-lead', name: 'June Tavares', email: 'lead@hardpan.example' },
  { role: 'technician', name: 'Theo Lindqvist', email: 'tech@hardpan.example' },
  { role: 'superintendent', name: 'Rosa Okafor', email: 'super@hardpan.example' },
  { role: 'owner-rep', name: 'Mira Vasquez', email: 'owner@hardpan.example' },
  { role: 'operator', name: 'Dale Brandt', email: 'operator@hardpan.example' },
]

export type DemoIds = Readonly<Record<Role, string>>

export async function createPeople(manager: EntityManager, chance: Chance, now: Date): Promise<DemoIds> {
  const passwordHash = await hashPassword(DEMO_PASSWORD)
  const ids: Partial<Record<Role, string>> = {}
  for (const { role, name, email } of DEMO_PEOPLE) {
    const id = chance.id()
    await manager.insert(UserEntity, { id, name, email, passwordHash, createdAt: now, updatedAt: now })
    ids[role] = id
  }
  return ids as DemoIds
}
