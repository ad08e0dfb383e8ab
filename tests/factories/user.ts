import { randomUUID } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import { UserEntity } from '#api/entities/user.entity.ts'
import { hashPassword } from '#api/features/session/find-user-by-password.ts'

/** The password of every built person. */
export const PASSWORD = 'correct horse staple'

let hash: Promise<string> | undefined

/** A person with an account; the e-mail address is new each time. */
export async function buildUser(manager: EntityManager, overrides: Partial<UserEntity> = {}): Promise<UserEntity> {
  hash ??= hashPassword(PASSWORD)
  const id = randomUUID()
  const now = new Date()
  const user: UserEntity = {
    id,
    email: `${id.slice(0, 13)}@example.test`,
    name: `Person ${id.slice(0, 4)}`,
    passwordHash: await hash,
    createdAt: now,
    updatedAt: now,
    ...overrides,
  }
  await manager.insert(UserEntity, user)
  return user
}
