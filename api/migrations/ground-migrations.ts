import { CreateSitePlan1796083200006 } from '#api/migrations/1796083200006-create-site-plan.ts'
import { CreateDerivedGround1796083200007 } from '#api/migrations/1796083200007-create-derived-ground.ts'
import { CreateGroundFacts1796083200008 } from '#api/migrations/1796083200008-create-ground-facts.ts'

export const groundMigrations = [CreateSitePlan1796083200006, CreateDerivedGround1796083200007, CreateGroundFacts1796083200008]
