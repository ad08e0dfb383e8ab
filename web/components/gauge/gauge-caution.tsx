import { Caution } from '#web/components/ui/caution.tsx'

/** The usual words beside a nuclear gauge; the licence and the radiation safety officer go before them. */
export function GaugeCaution() {
  return (
    <Caution title="Nuclear gauge">
      Only by a trained user under your licence, badge worn, gauge attended or locked twice. If it is hit, lost or will not shield: keep everybody away and call the radiation safety officer.
    </Caution>
  )
}
