import { Button } from '#web/components/ui/button.tsx'
import { NumberField, SelectField, TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { withoutCells } from '#web/features/ground/plan/cell-choice.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { CellsChoice } from '#web/features/ground/tasks/cells-choice.tsx'
import { QuartersField } from './quarters-field.tsx'
import type { PlacementForm } from './use-placement-draft.ts'
import { VolumeFacts } from './volume-facts.tsx'

function LiftFields({ draft, change, reading }: PlacementForm) {
  const { units, label } = useSite()
  const { plan, chosen, choose } = useGroundView()
  const { problems, lift, lifts, unfit, zone, volume } = reading
  const [only] = chosen
  const layer = only === undefined || lift === null ? undefined : plan.layerOf(only, lift)
  return (
    <>
      <CellsChoice error={problems.cells} comesTo={volume?.ok === true ? units.volume(volume.geometryCm3) : undefined} />
      {chosen.length === 1 && only !== undefined && <QuartersField label={label(only)} value={draft.quarters} onChange={(quarters) => change({ quarters })} />}
      <SelectField
        label={zone === undefined ? 'Lift' : `Lift of ${zone.name}`}
        value={lift ?? ''}
        error={problems.lift}
        hint={layer === undefined ? undefined : `to ${units.elevation(layer.topUm)}, ${units.thickness(layer.topUm - layer.bottomUm)} compacted in ${label(only ?? 0)}`}
        onChange={(event) => change({ lift: Number(event.target.value) })}
      >
        {lift === null && <option value="">Choose cells first</option>}
        {lifts.map((each) => (
          <option key={each} value={each}>
            Lift {each}
          </option>
        ))}
      </SelectField>
      {unfit.length > 0 && unfit.length < chosen.length && (
        <Button className="justify-self-start" onClick={() => choose(withoutCells(chosen, unfit))}>
          Leave {plan.range(unfit)} out
        </Button>
      )}
    </>
  )
}

/** The fields of a placement, with its volume both ways. */
export function PlacementFields(form: PlacementForm) {
  const { draft, change, reading, materials } = form
  const { units } = useSite()
  const { problems, volume } = reading
  return (
    <>
      <LiftFields {...form} />
      <SelectField label="Borrow material" value={draft.materialId} error={problems.materialId} onChange={(event) => change({ materialId: event.target.value })}>
        {draft.materialId === '' && <option value="">{materials.length === 0 ? 'Record one in Lab first' : 'Choose'}</option>}
        {materials.map((material) => (
          <option key={material.id} value={material.id}>
            {material.name}
          </option>
        ))}
      </SelectField>
      <TextField label="Placed at" type="datetime-local" value={draft.happenedAt} error={problems.happenedAt} onChange={(event) => change({ happenedAt: event.target.value })} />
      <div className="grid grid-cols-2 gap-3">
        <NumberField label="Loads" value={draft.loads} error={problems.loads} onChange={(event) => change({ loads: event.target.value })} />
        <NumberField label="One load, loose" unit={units.marks.volume} value={draft.loadVolume} error={problems.loadVolume} onChange={(event) => change({ loadVolume: event.target.value })} />
      </div>
      <VolumeFacts volume={volume} />
      <TextField label="Machine" value={draft.machine} maxLength={200} onChange={(event) => change({ machine: event.target.value })} />
      <div className="grid grid-cols-2 gap-3">
        <NumberField label="Passes" value={draft.passes} error={problems.passes} onChange={(event) => change({ passes: event.target.value })} />
        <NumberField label="Loose thickness" unit={units.marks.thickness} value={draft.looseThickness} error={problems.looseThickness} onChange={(event) => change({ looseThickness: event.target.value })} />
      </div>
      <TextArea label="Remarks" rows={2} value={draft.remarks} maxLength={2000} onChange={(event) => change({ remarks: event.target.value })} />
    </>
  )
}
