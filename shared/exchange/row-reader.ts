import { GROUP_WORDS, readUnit, type ExchangeUnit, type GroupUnits, type UnitGroup } from '#shared/exchange/exchange-units.ts'
import { readWord } from '#shared/exchange/exchange-words.ts'
import { readNumber, type DecimalMark } from '#shared/exchange/read-number.ts'
import type { DateOrder } from '#shared/exchange/site-time.ts'
import { columnOf, UNIT_COLUMN, type ColumnKey, type RowCells } from '#shared/exchange/test-columns.ts'
import type { RowProblem } from '#shared/schemas/test-exchange.ts'
import type { LengthUnit } from '#shared/units/length.ts'

/** How the cells of a file are to be understood. */
export interface ReadOptions {
  /** units that the heads of columns name */
  readonly headUnits: Readonly<Partial<Record<ColumnKey, ExchangeUnit>>>
  /** units for what neither head nor row names */
  readonly groupUnits: GroupUnits
  readonly decimal: DecimalMark
  readonly dateOrder: DateOrder
  readonly timeZone: string
  readonly planUnit: LengthUnit
}

/** Reads one row cell by cell, keeps what is wrong with each, and knows which cells nobody asked for. */
export class RowReader {
  readonly problems: RowProblem[] = []
  readonly options: ReadOptions
  readonly #cells: RowCells
  readonly #used = new Set<ColumnKey>()

  constructor(cells: RowCells, options: ReadOptions) {
    this.#cells = cells
    this.options = options
  }

  /** What stands in the cell, without blanks around it. */
  text(key: ColumnKey): string {
    this.#used.add(key)
    return (this.#cells[key] ?? '').trim()
  }

  has(key: ColumnKey): boolean {
    return (this.#cells[key] ?? '').trim() !== ''
  }

  fail(column: ColumnKey, message: string): void {
    this.problems.push({ column, message })
  }

  /** A number, NaN with the problem told where it cannot be read; undefined where the cell is empty and may be. */
  optional(key: ColumnKey): number | undefined {
    const text = this.text(key)
    if (text === '') return undefined
    const { unit } = columnOf(key)
    const value = readNumber(unit === '%' ? text.replace(/\s*%$/, '') : text, this.options.decimal)
    if (value === undefined) this.fail(key, `“${text.slice(0, 40)}” is no number. Write it plainly, such as ${this.options.decimal === '.' ? '12.5' : '12,5'}.`)
    return value ?? Number.NaN
  }

  number(key: ColumnKey): number {
    if (!this.has(key)) this.fail(key, `Give the ${lower(key)}.`)
    return this.optional(key) ?? Number.NaN
  }

  /** One of a few words; `missing` where the cell is empty, undefined with the problem told where it is another. */
  choice<T extends string>(key: ColumnKey, words: Readonly<Record<T, string>>, missing?: NoInfer<T>): T | undefined {
    const text = this.text(key)
    if (text === '' && missing !== undefined) return missing
    const found = text === '' ? undefined : readWord(text, words)
    if (found === undefined) this.fail(key, `${text === '' ? `Give the ${lower(key)}` : `“${text.slice(0, 40)}” is not known here`}: ${Object.values<string>(words).join(', ')}.`)
    return found
  }

  /** The one unit of a group's readings in this row: by the head of each, the row's own unit column, or the file's choice. */
  unit<U extends ExchangeUnit>(group: UnitGroup, keys: readonly ColumnKey[]): U {
    const { headUnits, groupUnits } = this.options
    const beside = this.#unitBeside(group)
    let unit = beside
    for (const key of keys.filter((each) => this.has(each))) {
      const own = headUnits[key] ?? beside ?? groupUnits[group]
      if (unit !== undefined && own !== unit) this.fail(key, `It is given in ${own}, the rest of this sheet in ${unit}. One sheet has one unit: ${GROUP_WORDS[group].toLowerCase()}.`)
      unit ??= own
    }
    return (unit ?? groupUnits[group]) as U
  }

  #unitBeside(group: UnitGroup): ExchangeUnit | undefined {
    const key = UNIT_COLUMN[group]
    const text = key === undefined ? '' : this.text(key)
    if (key === undefined || text === '') return undefined
    const unit = readUnit(text, group)
    if (unit === undefined) this.fail(key, `“${text.slice(0, 20)}” is no unit for this.`)
    return unit
  }

  /** Cells that hold something and were not asked for: they do not belong to this method. */
  leftOver(keys: readonly ColumnKey[]): ColumnKey[] {
    return keys.filter((key) => this.has(key) && !this.#used.has(key))
  }
}

/** A column's label inside a sentence. */
export function lower(key: ColumnKey): string {
  const { label } = columnOf(key)
  return label.charAt(0).toLowerCase() + label.slice(1)
}
