import type { FieldMethod } from '#shared/domain/field-sheets.ts'
import { Caution } from '#web/components/ui/caution.tsx'

export { MoistureCaution } from '#web/components/ui/moisture-caution.tsx'

/** Where measuring can hurt someone; the site's own plan goes before these words. */
export function MethodCaution({ method }: { method: FieldMethod }) {
  if (method !== 'nuclear-gauge') return null
  return (
    <Caution title="Nuclear gauge">
      Only by a trained, licensed user under your radiation safety programme. Keep it attended or locked twice.
    </Caution>
  )
}
