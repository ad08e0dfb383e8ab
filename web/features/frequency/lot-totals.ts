import type { Lot } from '#shared/schemas/lot.ts'

export type LotTotal = {
  readonly zoneId: string
  readonly materialId: string
  readonly materialName: string
  readonly lots: number
  readonly volumeCm3: number
  readonly spokenCm3: number
  readonly required: number
  readonly taken: number
  readonly passing: number
  readonly owed: number
}

const SUMMED = ['volumeCm3', 'spokenCm3', 'required', 'taken', 'passing', 'owed'] as const

/** Whole numbers summed by zone and material, in the order the zones are given; their sums are the board's totals. */
export function totalsOf(lots: readonly Lot[], zoneOrder: readonly string[]): LotTotal[] {
  const totals = new Map<string, LotTotal>()
  for (const lot of lots) {
    const key = `${lot.zoneId} ${lot.materialId}`
    const known = totals.get(key)
    totals.set(key, known === undefined ? { ...pick(lot), lots: 1 } : add(known, lot))
  }
  const place = (total: LotTotal) => zoneOrder.indexOf(total.zoneId)
  return [...totals.values()].sort((a, b) => place(a) - place(b) || a.materialName.localeCompare(b.materialName))
}

export function sumOf(totals: readonly LotTotal[]): Omit<LotTotal, 'zoneId' | 'materialId' | 'materialName'> {
  const start = { lots: 0, volumeCm3: 0, spokenCm3: 0, required: 0, taken: 0, passing: 0, owed: 0 }
  return totals.reduce((sum, total) => {
    const next = { ...sum, lots: sum.lots + total.lots }
    for (const name of SUMMED) next[name] = sum[name] + total[name]
    return next
  }, start)
}

function pick({ zoneId, materialId, materialName, volumeCm3, spokenCm3, required, taken, passing, owed }: Lot): Omit<LotTotal, 'lots'> {
  return { zoneId, materialId, materialName, volumeCm3, spokenCm3, required, taken, passing, owed }
}

function add(known: LotTotal, lot: Lot): LotTotal {
  const next = { ...known, lots: known.lots + 1 }
  for (const name of SUMMED) next[name] = known[name] + lot[name]
  return next
}
