import { hash, verify } from '@node-rs/argon2'
import type { EntityManager } from 'typeorm'
import { UserEntity } from '#api/entities/user.entity.ts'

/** Stands in for a stranger's hash, so that an unknown address takes as long as a wrong password. */
let strangersHash: Promise<string> | undefined

export function hashPassword(password: string): Promise<string> {
  return hash(password)
}

/** The person with this e-mail address and password, or null; how long it takes says nothing about which was wrong. */
export async function findUserByPassword(manager: EntityManager, email: string, password: string): Promise<Express.User | null> {
  strangersHash ??= hashPassword('a password nobody has')
  const user = await manager.findOneBy(UserEntity, { email: email.trim().toLowerCase() })
  const matches = await verify(user?.passwordHash ?? (await strangersHash), password)
  return user && matches ? { id: user.id, email: user.email, name: user.name } : null
}
