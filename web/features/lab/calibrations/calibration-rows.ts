import type { Calibration } from '#shared/schemas/calibration.ts'
import { THIN_SPACE } from '#shared/units/format.ts'
import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import { KIND_WORDS } from './calibration-form.ts'

export type MeasuredRow = { readonly label: string; readonly value: string }

/** Every measurement of a calibration as it was entered, in its own unit. */
export function measuredRows(sheet: Calibration['sheet']): MeasuredRow[] {
  const { columns } = KIND_WORDS[sheet.kind]
  const row = (label: string, value: number, unit: string): MeasuredRow => ({ label, value: `${value.toLocaleString('en-US', { maximumFractionDigits: 10 })}${THIN_SPACE}${unit}` })
  const column = (index: number, values: readonly number[], unit: string) => values.map((value, i) => row(`${columns[index]} ${i + 1}`, value, unit))
  switch (sheet.kind) {
    case 'sand-density':
      return [row('Volume of the container', sheet.containerVolume, VOLUME_UNIT_LABEL[sheet.volumeUnit]), row('Container, empty', sheet.container, sheet.massUnit), ...column(0, sheet.filled, sheet.massUnit)]
    case 'cone':
      return sheet.trials.flatMap(({ before, after }, i) => [row(`${columns[0]} ${i + 1}`, before, sheet.massUnit), row(`${columns[1]} ${i + 1}`, after, sheet.massUnit)])
    case 'cylinder':
      return [...column(0, sheet.diameters, sheet.lengthUnit), ...column(1, sheet.heights, sheet.lengthUnit)]
    case 'balloon':
      return sheet.trials.flatMap(({ known, before, after }, i) => [known, before, after].map((value, at) => row(`${columns[at]} ${i + 1}`, value, VOLUME_UNIT_LABEL[sheet.volumeUnit])))
  }
}
