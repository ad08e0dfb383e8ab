import { useFormContext, useWatch } from 'react-hook-form'
import { judgeDrying } from '#shared/domain/constant-mass.ts'
import { Button } from '#web/components/ui/button.tsx'
import { earlierWeighings, reading } from './read-sheet.ts'
import type { TestForm } from './test-form.ts'

/** Drying to constant mass in a microwave: each weighing is put aside before the next, until the last two agree. */
export function DryingSteps() {
  const { control, setValue, setFocus } = useFormContext<TestForm>()
  const { earlier, dryAndTin, wetAndTin, tin, massUnit } = useWatch({ control, name: 'moisture' })
  const kept = earlier.split(' ').filter((mass) => mass !== '')
  const drying = judgeDrying({ wetAndTin: reading(wetAndTin), dryAndTin: reading(dryAndTin), tin: reading(tin), earlier: earlierWeighings(earlier) })
  const keep = (masses: readonly string[], last: string): void => {
    setValue('moisture.earlier', masses.join(' '), { shouldDirty: true })
    setValue('moisture.dryAndTin', last, { shouldDirty: true })
    setFocus('moisture.dryAndTin')
  }
  return (
    <div className="col-span-full">
      {kept.length > 0 && (
        <p className="m-0 mb-2 text-small" aria-live="polite">
          Weighed before: <span className="num">{kept.join(', ')}</span> {massUnit}.{' '}
          {Number.isFinite(drying.lastChangePercent) && drying.lastChangePercent !== null && (
            <b className="font-semibold">
              Last change {drying.lastChangePercent.toFixed(2)} % of the wet soil: {drying.constant === true ? 'constant mass.' : 'not constant yet.'}
            </b>
          )}
        </p>
      )}
      <div className="flex flex-wrap gap-2">
        <Button disabled={!Number.isFinite(reading(dryAndTin))} onClick={() => keep([...kept, dryAndTin.trim()], '')}>
          Dried again, weigh again
        </Button>
        {kept.length > 0 && (
          <Button kind="quiet" onClick={() => keep(kept.slice(0, -1), kept[kept.length - 1] ?? '')}>
            Take the last back
          </Button>
        )}
      </div>
    </div>
  )
}
