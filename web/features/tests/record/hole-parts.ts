import { formatHoleVolume, THIN_SPACE } from '#shared/units/format.ts'

/** A hole's volume as figure and unit, ft³ where the sheet is in pounds and feet; the unit alone while it cannot be worked out. */
export function holeParts(cm3: number | null, customary: boolean): readonly [figure: string | null, unit: string] {
  if (cm3 === null) return [null, customary ? 'ft³' : 'cm³']
  const [figure = '', unit = ''] = formatHoleVolume(cm3, customary ? 'us' : 'si').split(THIN_SPACE)
  return [figure, unit]
}
