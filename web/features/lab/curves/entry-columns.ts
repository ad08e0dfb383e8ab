import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

/** The units a sheet may be written down in. */
export const MASSES = ['g', 'kg', 'lb'] as const
export const DENSITIES = ['pcf', 'kN/m3', 'kg/m3', 'g/cm3'] as const
export const VOLUMES = ['cm3', 'ft3', 'in3'] as const

export type EntryKind = 'dry' | 'wet' | 'masses'
export type MoistureBy = 'stated' | 'one-tin' | 'two-tins'
export type EntryColumn = 'moisture' | 'density' | 'wetDensity' | 'soil' | 'wet1' | 'dry1' | 'tin1' | 'wet2' | 'dry2' | 'tin2'
/** One specimen as typed, by column; what is not there is blank. */
export type EntryRow = Readonly<Partial<Record<EntryColumn, string>>>

/** How the sheet is written down, and in which units. */
export type EntryForm = {
  readonly kind: EntryKind
  readonly moistureBy: MoistureBy
  readonly densityUnit: DensityUnit
  readonly massUnit: MassUnit
  readonly tinUnit: MassUnit
  readonly volumeUnit: VolumeUnit
  readonly mould: string
  readonly mouldVolume: string
  readonly rows: readonly EntryRow[]
}

export type ColumnWords = { readonly key: EntryColumn; /** at the head of the column */ readonly head: string; /** said to those who cannot see the table */ readonly name: string; readonly unit: string; /** what a spreadsheet may call it */ readonly known: RegExp }

const TIN_COLUMNS = (n: 1 | 2, unit: string, tins: number): ColumnWords[] => {
  const tin = tins === 1 ? 'tin' : `tin ${n}`
  const own = tins === 1 ? '' : `.*${n}`
  return [
    { key: `wet${n}`, head: `Wet and ${tin}`, name: `wet soil and ${tin}`, unit, known: new RegExp(`^wet.*(tin|can|soil)${own}`, 'i') },
    { key: `dry${n}`, head: `Dry and ${tin}`, name: `dry soil and ${tin}`, unit, known: new RegExp(`^dry.*(tin|can|soil)${own}`, 'i') },
    { key: `tin${n}`, head: tin.charAt(0).toUpperCase() + tin.slice(1), name: tin, unit, known: new RegExp(`^(tin|can|tare)${own}`, 'i') },
  ]
}

/** The columns of a sheet, in the order they are typed and pasted. */
export function columnsOf({ kind, moistureBy, densityUnit, massUnit, tinUnit }: Omit<EntryForm, 'rows' | 'mould' | 'mouldVolume'>): ColumnWords[] {
  const density = DENSITY_UNIT_LABEL[densityUnit]
  const moisture: ColumnWords[] =
    moistureBy === 'stated'
      ? [{ key: 'moisture', head: 'Moisture', name: 'moisture', unit: '%', known: /moisture|water|^w\b|^mc\b/i }]
      : moistureBy === 'one-tin'
        ? TIN_COLUMNS(1, tinUnit, 1)
        : [...TIN_COLUMNS(1, tinUnit, 2), ...TIN_COLUMNS(2, tinUnit, 2)]
  switch (kind) {
    case 'dry':
      return [
        ...moisture,
        { key: 'density', head: 'Dry', name: 'dry unit weight', unit: density, known: /^(?!.*(mou?ld|tin|can|tare)).*dry/i },
        { key: 'wetDensity', head: 'Wet, if stated', name: 'wet unit weight, if stated', unit: density, known: /(wet|moist|bulk).*(density|unit|weight)/i },
      ]
    case 'wet':
      return [...moisture, { key: 'density', head: 'Wet', name: 'wet unit weight', unit: density, known: /^(?!.*(mou?ld|tin|can|tare)).*(wet|moist(?!ure)|bulk)/i }]
    case 'masses':
      return [...moisture, { key: 'soil', head: 'Mould and soil', name: 'mould and soil', unit: massUnit, known: /mou?ld/i }]
  }
}
