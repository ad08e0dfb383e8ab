import { registerKeySchema, REGISTER_KEYS } from '#shared/schemas/test-register.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { SelectField } from '#web/components/ui/text-fields.tsx'
import { countOf } from '#web/features/tests/outcome-words.ts'
import { PlaceFields, PurposeChoice, RecordFields, StandingFields } from './filter-fields.tsx'
import { REGISTER_COLUMNS } from './register-columns.tsx'
import type { RegisterControls } from './use-register.ts'

/** Everything that narrows the register; on a phone its order too. What is chosen shows at once behind it. */
export function FilterDialog({ controls, total, onClose }: { controls: RegisterControls; total: number | undefined; onClose: () => void }) {
  const { address, narrow, clear } = controls
  const { filter } = address
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title="Which tests"
      actions={
        <>
          <DialogClose>
            <Button kind="primary" size="touch">
              {total === undefined ? 'Show them' : `Show ${countOf(total, 'test')}`}
            </Button>
          </DialogClose>
          <Button size="touch" onClick={clear}>
            Clear filters
          </Button>
        </>
      }
    >
      <div className="grid gap-4">
        <SortFields controls={controls} />
        <div className="grid grid-cols-2 gap-x-[14px] gap-y-3 sm:grid-cols-4">
          <PlaceFields filter={filter} narrow={narrow} />
          <RecordFields filter={filter} narrow={narrow} />
        </div>
        <PurposeChoice filter={filter} narrow={narrow} />
        <div className="grid grid-cols-2 gap-x-[14px] gap-y-3 sm:grid-cols-3">
          <StandingFields filter={filter} narrow={narrow} />
        </div>
      </div>
    </Dialog>
  )
}

/** A list has no heads of columns to sort by. */
function SortFields({ controls: { address, sortBy } }: { controls: RegisterControls }) {
  const { key, direction } = address.sort
  return (
    <div className="flex flex-wrap items-end gap-3 md:hidden">
      <SelectField label="Sort by" className="min-w-40 flex-1" value={key} onChange={(event) => sortBy({ key: registerKeySchema.parse(event.target.value), direction })}>
        {REGISTER_KEYS.map((each) => (
          <option key={each} value={each}>
            {REGISTER_COLUMNS[each].name}
          </option>
        ))}
      </SelectField>
      <Segmented
        label="Order"
        size="touch"
        value={direction}
        options={[
          { value: 'asc', label: 'Rising' },
          { value: 'desc', label: 'Falling' },
        ]}
        onChange={(next) => sortBy({ key, direction: next })}
      />
    </div>
  )
}
