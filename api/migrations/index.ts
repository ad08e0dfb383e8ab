import { groundMigrations } from '#api/migrations/ground-migrations.ts'
import { CreateUsers1796083200001 } from '#api/migrations/1796083200001-create-users.ts'
import { CreateSessions1796083200002 } from '#api/migrations/1796083200002-create-sessions.ts'
import { CreateSites1796083200003 } from '#api/migrations/1796083200003-create-sites.ts'
import { CreateSiteHeads1796083200004 } from '#api/migrations/1796083200004-create-site-heads.ts'
import { CreateEvents1796083200005 } from '#api/migrations/1796083200005-create-events.ts'

/** Every migration in order; add one line for a new one. */
export const migrations = [
  CreateUsers1796083200001,
  CreateSessions1796083200002,
  CreateSites1796083200003,
  CreateSiteHeads1796083200004,
  CreateEvents1796083200005,
  ...groundMigrations,
]
