import type { FieldMethod, MoistureMethod } from '#shared/domain/field-sheets.ts'
import { Caution } from '#web/components/ui/caution.tsx'

/** Where measuring can hurt someone; the site's own plan goes before these words. */
export function MethodCaution({ method }: { method: FieldMethod }) {
  if (method !== 'nuclear-gauge') return null
  return (
    <Caution title="Nuclear gauge">
      Only by a trained, licensed user under your radiation safety programme. Keep it attended or locked twice.
    </Caution>
  )
}

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
