import { Column, PrimaryColumn } from 'typeorm'
import type { ColumnOptions, ValueTransformer } from 'typeorm'

/** The driver gives DECIMAL and BIGINT as text, so that nothing is rounded unasked; ours all fit a number. */
export const numberFromText: ValueTransformer = {
  to: (value: unknown) => value,
  from: (value: string | number | null) => (value === null ? null : Number(value)),
}

type Options = Omit<ColumnOptions, 'name' | 'type' | 'transformer'>

/** Ids compare byte by byte; schemas make them lower case. */
const ID = { length: 36, charset: 'ascii', collation: 'ascii_bin' } as const

export function IdColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'char', ...ID, ...options, name })
}

export function PrimaryIdColumn(name: string): PropertyDecorator {
  return PrimaryColumn({ type: 'char', ...ID, name })
}

/** A SHA-256 in lower-case hexadecimal. */
export function HashColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'char', length: 64, charset: 'ascii', collation: 'ascii_bin', ...options, name })
}

/** A calendar day, YYYY-MM-DD, as text: a day has no time zone. */
export function DayColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'char', charset: 'ascii', collation: 'ascii_bin', ...options, name, length: 10 })
}

/** A closed word (state, kind, role): ascii, compared byte by byte. */
export function WordColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'varchar', length: 32, charset: 'ascii', collation: 'ascii_bin', ...options, name })
}

/** What a person typed, with a stated scale. */
export function DecimalColumn(
  name: string,
  precision: number,
  scale: number,
  options: Options = {},
): PropertyDecorator {
  return Column({ type: 'decimal', ...options, name, precision, scale, transformer: numberFromText })
}

/** Counted whole numbers that may pass 2³¹ (cm³, mm²) and stay below 2⁵³. */
export function BigCountColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'bigint', ...options, name, transformer: numberFromText })
}

export function IntColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'int', ...options, name })
}

/** A derived quantity. */
export function DoubleColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'double', ...options, name })
}

/** An instant: UTC, to the millisecond, a Date in code. */
export function InstantColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'datetime', ...options, name, precision: 3 })
}

export function JsonColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'json', ...options, name })
}

export function TextColumn(name: string, length: number, options: Options = {}): PropertyDecorator {
  return Column({ type: 'varchar', ...options, name, length })
}

export function BooleanColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column({ type: 'boolean', ...options, name })
}

export function PrimaryIntColumn(name: string): PropertyDecorator {
  return PrimaryColumn('int', { name })
}

/** A code or a handful of bits, 0 to 255. */
export function TinyCountColumn(name: string, options: Options = {}): PropertyDecorator {
  return Column('tinyint', { unsigned: true, ...options, name })
}
