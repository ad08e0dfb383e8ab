import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import type { Rgb } from '#shared/look/colour.ts'
import { stateLook, type Hatch } from '#shared/look/ground-look.ts'
import { MARK_INK, SHEET_COLOURS, type Theme } from '#shared/look/theme.ts'

/** The shared look as the arrays the shader takes, one item a state. */
export interface BoardPalette {
  /** alpha 0 where the sheet shows through */
  readonly fill: Float32Array
  readonly mark: Float32Array
  readonly near: Float32Array
  /** first and second family of lines: unit vector across, spacing, half stroke; half stroke 0 for none */
  readonly lines: Float32Array
  readonly cross: Float32Array
  /** where the first family begins, and the tile of a stipple, 0 for none */
  readonly shift: Float32Array
  readonly line: Float32Array
  readonly lineWidth: Float32Array
  readonly ink: Float32Array
  readonly sheetInk: Float32Array
  readonly preview: Float32Array
}

type Family = readonly [x: number, y: number, spacing: number, halfStroke: number]

const NO_LINES: Family = [0, 0, 1, 0]
const SLANT = Math.SQRT1_2

interface HatchFigures {
  readonly lines: Family
  readonly cross: Family
  readonly shift: readonly [begin: number, stippleTile: number]
}

/** Lines repeat every `spacing` along an axis, so slanted ones lie nearer to each other by √2. */
function hatchFigures({ kind, spacing, stroke }: Hatch): HatchFigures {
  const half = stroke / 2
  const rising: Family = [SLANT, SLANT, spacing * SLANT, half]
  switch (kind) {
    case 'none':
      return { lines: NO_LINES, cross: NO_LINES, shift: [0, 0] }
    case 'stipple':
      return { lines: NO_LINES, cross: NO_LINES, shift: [0, spacing] }
    case 'diagonals':
    case 'sparse-diagonals':
      return { lines: rising, cross: NO_LINES, shift: [0, 0] }
    case 'horizontals':
      return { lines: [0, 1, spacing, half], cross: NO_LINES, shift: [spacing / 2, 0] }
    case 'thin-verticals':
    case 'verticals':
      return { lines: [1, 0, spacing, half], cross: NO_LINES, shift: [spacing / 2, 0] }
    case 'cross-hatch':
      return { lines: rising, cross: [SLANT, -SLANT, spacing * SLANT, half], shift: [0, 0] }
  }
}

const share = (colour: Rgb): number[] => colour.map((channel) => channel / 255)
const array = (values: readonly (readonly number[])[]): Float32Array => new Float32Array(values.flat())

/** The palette of a theme. */
export function boardPalette(theme: Theme): BoardPalette {
  const looks = GROUND_STATES.map((state) => stateLook(state, theme))
  const hatches = looks.map((look) => hatchFigures(look.hatch))
  const isBare = (state: string): boolean => state === 'none' || state === 'not-placed'
  return {
    fill: array(looks.map((look) => (isBare(look.state) ? [0, 0, 0, 0] : [...share(look.fill.rgb), 1]))),
    mark: array(looks.map((look) => share(look.hatch.mark.rgb))),
    near: array(looks.map((look) => share(look.nearHatch.mark.rgb))),
    lines: array(hatches.map((hatch) => hatch.lines)),
    cross: array(hatches.map((hatch) => hatch.cross)),
    shift: array(hatches.map((hatch) => hatch.shift)),
    line: array(looks.map(({ cellLine }) => [...share(cellLine.colour.rgb), cellLine.opacity])),
    lineWidth: new Float32Array(looks.map((look) => look.cellLine.width)),
    // ground keeps its hues in both themes, so what is drawn on it keeps the dark ink
    ink: array([share(MARK_INK.rgb)]),
    sheetInk: array([share(SHEET_COLOURS[theme].ink.rgb)]),
    preview: array([share(stateLook('rework').hatch.mark.rgb)]),
  }
}
