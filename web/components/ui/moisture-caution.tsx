import type { MoistureMethod } from '#shared/domain/field-sheets.ts'
import { Caution } from './caution.tsx'

/** Where drying can hurt someone; the site's own plan goes before these words. */
export function MoistureCaution({ method }: { method: MoistureMethod }) {
  if (method === 'carbide') {
    return (
      <Caution title="Carbide tester">
        The gas burns and the vessel is under pressure. Open it slowly, in the open air, away from any flame; follow the site’s safety plan.
      </Caution>
    )
  }
  if (method === 'microwave') {
    return (
      <Caution title="Microwave drying">
        Soil and tin can burn, steam and burst: gloves, eye protection, ventilation. Never an oven that food goes into. Follow the site’s safety plan.
      </Caution>
    )
  }
  return null
}
