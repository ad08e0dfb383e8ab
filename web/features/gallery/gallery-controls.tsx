import { useState } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { Caution } from '#web/components/ui/caution.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { CalculatedField, CellsField, NumberField, SelectField, TextArea } from '#web/components/ui/text-fields.tsx'
import { chooseTheme, useThemeChoice } from '#web/lib/theme.ts'
import { GalleryColumn, GalleryPart } from './gallery-part.tsx'

const UNITS = [
  { value: 'us', label: 'cy, pcf, ft' },
  { value: 'si', label: 'm³, kN/m³, m' },
] as const
const THEMES = [
  { value: 'device', label: 'Device' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
] as const
const METHODS = [
  { value: 'cone', label: 'Sand cone' },
  { value: 'gauge', label: 'Nuclear gauge' },
  { value: 'plain', label: 'Density and moisture' },
] as const

export function GalleryControls() {
  const [units, setUnits] = useState<'us' | 'si'>('us')
  const [method, setMethod] = useState<'cone' | 'gauge' | 'plain'>('cone')
  const theme = useThemeChoice()
  return (
    <GalleryColumn>
      <GalleryPart title="Actions">
        <div className="flex flex-wrap gap-2">
          <Button kind="primary">Save result</Button>
          <Button>Place fill</Button>
          <Button kind="quiet">Cancel</Button>
          <Button kind="danger">Void with reason</Button>
          <Button disabled>Not yet</Button>
          <Button kind="primary" busyLabel="Saving">
            Save
          </Button>
          <Button size="touch">Touch size</Button>
        </div>
        <div className="mt-2 max-w-[376px]">
          <Button kind="act" size="cab">
            Ready for retest
          </Button>
        </div>
      </GalleryPart>
      <GalleryPart title="Choices">
        <div className="grid justify-items-start gap-3">
          <Segmented label="Units" options={UNITS} value={units} onChange={setUnits} />
          <Segmented label="Theme" options={THEMES} value={theme} onChange={chooseTheme} />
        </div>
        <div className="mt-3">
          <Segmented label="Method" wide options={METHODS} value={method} onChange={setMethod} />
        </div>
      </GalleryPart>
      <GalleryPart title="Fields">
        <div className="grid gap-3">
          <NumberField label="Moist soil from hole" unit="g" defaultValue="4,002" />
          <NumberField label="Dry soil and tin" unit="g" defaultValue="431.0" error="Dry is heavier than wet (412.6 g). Check which is which." />
          <NumberField
            label="Hole volume"
            unit="cm³"
            defaultValue="1,180"
            warning="Small for ¾ in soil: the method asks for 1,700 or more. You may save it, flagged."
          />
          <CellsField label="Cells" defaultValue="G11:I13, K12" comesTo="10 cells, 618 cy" />
          <CalculatedField label="Max dry unit weight" value="117.6" unit="pcf" />
          <SelectField label="Curve" defaultValue="rb3">
            <option value="rb3">RB-3, D698 A</option>
            <option value="rb4">RB-4, D1557 A</option>
          </SelectField>
          <TextArea label="Remarks" hint="Where it helps whoever reads this next." rows={2} />
        </div>
      </GalleryPart>
      <GalleryPart title="Caution">
        <Caution title="Nuclear gauge">
          Only by a trained, licensed user under your radiation safety programme. Keep it attended or locked twice.
        </Caution>
      </GalleryPart>
    </GalleryColumn>
  )
}
