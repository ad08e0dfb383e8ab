import { Entity, Index } from 'typeorm'
import { Identified } from '#api/entities/base.ts'
import { TextColumn } from '#api/entities/columns.ts'

@Entity('user')
@Index('uq_user_email', ['email'], { unique: true })
export class UserEntity extends Identified {
  /** lower case */
  @TextColumn('email', 254)
  email!: string

  @TextColumn('name', 120)
  name!: string

  @TextColumn('password_hash', 255)
  passwordHash!: string
}
