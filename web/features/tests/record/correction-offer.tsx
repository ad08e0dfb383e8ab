import { useFormContext, useWatch } from 'react-hook-form'
import { useUnits } from '#web/lib/site-context.tsx'
import { useChosenGauge } from './gauge-choice.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

/** The correction in force for this gauge and material, one tap from the field. */
export function CorrectionOffer() {
  const units = useUnits()
  const { control, setValue } = useFormContext<TestForm>()
  const { assessment } = useRecord()
  const { gauge } = useChosenGauge()
  const typed = useWatch({ control, name: 'moisture.correctionK' })
  const correction = gauge?.corrections.find((each) => each.materialId === assessment.curve?.materialId)
  if (correction === undefined) return <>0 for none</>
  const text = String(Number(correction.k.toFixed(2)))
  const from = `mean of ${correction.pairs.length} ${correction.pairs.length === 1 ? 'pair' : 'pairs'}, ${correction.materialName}`
  if (typed.trim() === text) return <>In force: {from}</>
  return (
    <button type="button" className="link-ink text-left pointer-coarse:min-h-11" onClick={() => setValue('moisture.correctionK', text, { shouldDirty: true, shouldTouch: true })}>
      Use {units.number(correction.k, 2)}, {from}
    </button>
  )
}
