import { CreateSitePlan1796083200006 } from '#api/migrations/1796083200006-create-site-plan.ts'
import { CreateDerivedGround1796083200007 } from '#api/migrations/1796083200007-create-derived-ground.ts'
import { CreateGroundFacts1796083200008 } from '#api/migrations/1796083200008-create-ground-facts.ts'
import { CreateTestsAndStakes1796083200009 } from '#api/migrations/1796083200009-create-tests-and-stakes.ts'
import { AddCoarsePartToCurves1796083200010 } from '#api/migrations/1796083200010-add-coarse-part-to-curves.ts'
import { CreateCalibrations1796083200011 } from '#api/migrations/1796083200011-create-calibrations.ts'
import { CreateGauges1796083200012 } from '#api/migrations/1796083200012-create-gauges.ts'
import { CreateAttachments1796083200013 } from '#api/migrations/1796083200013-create-attachments.ts'
import { AddLabSheet1796083200014 } from '#api/migrations/1796083200014-add-lab-sheet.ts'
import { KeepVerdicts1796083200015 } from '#api/migrations/1796083200015-keep-verdicts.ts'
import { CreateOnePointChecks1796083200016 } from '#api/migrations/1796083200016-create-one-point-checks.ts'
import { CreateSavedViews1796083200017 } from '#api/migrations/1796083200017-create-saved-views.ts'
import { KeepOversizeAsEntered1796083200020 } from '#api/migrations/1796083200020-keep-oversize-as-entered.ts'

export const groundMigrations = [
  CreateSitePlan1796083200006,
  CreateDerivedGround1796083200007,
  CreateGroundFacts1796083200008,
  CreateTestsAndStakes1796083200009,
  AddCoarsePartToCurves1796083200010,
  CreateCalibrations1796083200011,
  CreateGauges1796083200012,
  CreateAttachments1796083200013,
  AddLabSheet1796083200014,
  KeepVerdicts1796083200015,
  CreateOnePointChecks1796083200016,
  CreateSavedViews1796083200017,
  KeepOversizeAsEntered1796083200020,
]
