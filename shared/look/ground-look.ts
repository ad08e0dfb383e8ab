import type { GroundFlag, GroundState } from '#shared/domain/ground-state.ts'
import { colourOf, type Colour } from '#shared/look/colour.ts'
import { MARK_INK, SHEET_COLOURS, WHITE, type Theme } from '#shared/look/theme.ts'

export const HATCH_KINDS = [
  'none',
  'stipple',
  'diagonals',
  'sparse-diagonals',
  'horizontals',
  'thin-verticals',
  'verticals',
  'cross-hatch',
] as const
export type HatchKind = (typeof HATCH_KINDS)[number]

/**
 * A hatch in screen pixels, repeating every `spacing` in x and in y from the top left.
 * - stipple: the dots of STIPPLE_DOTS, scaled to `spacing`;
 * - diagonals, sparse-diagonals: lines x + y = k · spacing (rising to the right);
 * - horizontals: lines y = (k + ½) · spacing; thin-verticals, verticals: lines x = (k + ½) · spacing;
 * - cross-hatch: lines x + y = k · spacing and x − y = k · spacing.
 * `stroke` is the full width of a line, measured across it.
 */
export type Hatch = { readonly kind: HatchKind; readonly spacing: number; readonly stroke: number; readonly mark: Colour }

/** The dots of a stipple tile of side 1: x, y and radius as shares of the tile. */
export const STIPPLE_DOTS = [
  [0.2, 0.25, 0.09],
  [0.7, 0.5, 0.07],
  [0.4, 0.8, 0.09],
  [0.9, 0.93, 0.06],
] as const

/** The line between two cells of one state. */
export type CellLine = { readonly colour: Colour; readonly opacity: number; readonly width: number; readonly dash: readonly number[] }

export type StateLook = {
  readonly state: GroundState
  readonly fill: Colour
  readonly hatch: Hatch
  /** Lines of the near overlay on this state. */
  readonly nearHatch: Hatch
  readonly cellLine: CellLine
  /** Lettering laid straight on the fill. */
  readonly label: Colour
  readonly word: string
  readonly meaning: string
}

export type OverlayLook = { readonly flag: GroundFlag; readonly word: string; readonly meaning: string }

const SAND = colourOf('#ead9ad')
const SAND_MARK = colourOf('#9c8142')
const PALE_GREEN = colourOf('#8cc0b8')
const PALE_GREEN_MARK = colourOf('#3d7d76')
const DEEP_GREEN = colourOf('#1d6763')
const DEEP_GREEN_MARK = colourOf('#0f4a48')
const ORANGE = colourOf('#dd6a33')
const ORANGE_MARK = colourOf('#7f2d0d')
const VIOLET = colourOf('#8f73bd')
const VIOLET_MARK = colourOf('#4a2f7d')

/** Colours of the ground outside a state's own fill: charts, curves, the words of a verdict. */
export const GROUND_INKS = {
  sand: SAND,
  sandMark: SAND_MARK,
  meetsSpec: PALE_GREEN,
  meetsSpecMark: PALE_GREEN_MARK,
  released: DEEP_GREEN,
  releasedMark: DEEP_GREEN_MARK,
  rework: ORANGE,
  reworkMark: ORANGE_MARK,
  suspect: VIOLET,
  suspectMark: VIOLET_MARK,
} as const

const PLAIN_LINE: CellLine = { colour: WHITE, opacity: 0.55, width: 0.7, dash: [] }
const DEEP_LINE: CellLine = { colour: colourOf('#2c7a75'), opacity: 0.9, width: 0.7, dash: [] }

const noHatch = (mark: Colour): Hatch => ({ kind: 'none', spacing: 10, stroke: 0, mark })
const near = (mark: Colour): Hatch => ({ kind: 'horizontals', spacing: 5, stroke: 1, mark })

/** States drawn alike in both themes; the themes share the hues of the ground. */
const PLACED: Readonly<Record<Exclude<GroundState, 'none' | 'not-placed'>, Omit<StateLook, 'state'>>> = {
  'awaiting-test': {
    fill: SAND,
    hatch: { kind: 'stipple', spacing: 10, stroke: 1.8, mark: SAND_MARK },
    nearHatch: near(SAND_MARK),
    cellLine: PLAIN_LINE,
    label: MARK_INK,
    word: 'Awaiting test',
    meaning: 'no valid test speaks for all of it',
  },
  'awaiting-retest': {
    fill: SAND,
    hatch: { kind: 'sparse-diagonals', spacing: 16, stroke: 2.4, mark: ORANGE },
    nearHatch: near(SAND_MARK),
    cellLine: PLAIN_LINE,
    label: MARK_INK,
    word: 'Awaiting retest',
    meaning: 'rework reported done',
  },
  'meets-spec': {
    fill: PALE_GREEN,
    hatch: noHatch(PALE_GREEN_MARK),
    nearHatch: near(PALE_GREEN_MARK),
    cellLine: PLAIN_LINE,
    label: MARK_INK,
    word: 'Meets spec',
    meaning: 'not released yet',
  },
  released: {
    fill: DEEP_GREEN,
    hatch: noHatch(DEEP_GREEN_MARK),
    nearHatch: near(PALE_GREEN),
    cellLine: DEEP_LINE,
    label: WHITE,
    word: 'Released',
    meaning: 'may be covered',
  },
  'accepted-as-is': {
    fill: DEEP_GREEN,
    hatch: { kind: 'thin-verticals', spacing: 5, stroke: 0.9, mark: PALE_GREEN },
    nearHatch: near(PALE_GREEN),
    cellLine: DEEP_LINE,
    label: WHITE,
    word: 'Accepted as is',
    meaning: 'on an engineer’s disposition',
  },
  recheck: {
    fill: DEEP_GREEN,
    hatch: { kind: 'verticals', spacing: 9, stroke: 2.6, mark: SAND },
    nearHatch: near(PALE_GREEN),
    cellLine: DEEP_LINE,
    label: WHITE,
    word: 'Recheck',
    meaning: 'released, then rain or freeze',
  },
  rework: {
    fill: ORANGE,
    hatch: { kind: 'diagonals', spacing: 10, stroke: 1.7, mark: ORANGE_MARK },
    nearHatch: near(ORANGE_MARK),
    cellLine: PLAIN_LINE,
    label: MARK_INK,
    word: 'Rework',
    meaning: 'a failing test speaks for it',
  },
  suspect: {
    fill: VIOLET,
    hatch: { kind: 'cross-hatch', spacing: 10, stroke: 1.1, mark: VIOLET_MARK },
    nearHatch: near(VIOLET_MARK),
    cellLine: PLAIN_LINE,
    label: colourOf('#120a20'),
    word: 'Suspect',
    meaning: 'the result can’t be right',
  },
}

function bareLook(state: 'none' | 'not-placed', theme: Theme): StateLook {
  const sheet = SHEET_COLOURS[theme]
  const edge = theme === 'light' ? colourOf('#b7c3c0') : sheet.rule2
  const placed = state === 'not-placed'
  return {
    state,
    fill: placed ? sheet.sheet : sheet.film,
    hatch: noHatch(edge),
    nearHatch: near(edge),
    cellLine: { colour: edge, opacity: placed ? 1 : 0, width: 0.8, dash: [2, 3] },
    label: sheet.ink,
    word: placed ? 'Not placed' : 'No fill here',
    meaning: placed ? 'inside the design, nothing at this lift' : 'outside the design at this lift',
  }
}

/**
 * How a state is drawn: colour, hatch, word and one line of meaning. Map, rail, lists, charts and paper all read it.
 * @param theme only `none` and `not-placed` differ between themes; every placed state keeps its colours.
 */
export function stateLook(state: GroundState, theme: Theme = 'light'): StateLook {
  return state === 'none' || state === 'not-placed' ? bareLook(state, theme) : { state, ...PLACED[state] }
}

/** Words of the overlays; their forms are in OVERLAY_MARKS. */
export const OVERLAY_LOOKS: Readonly<Record<GroundFlag, OverlayLook>> = {
  near: { flag: 'near', word: 'Near a limit', meaning: 'within the method’s repeatability' },
  covered: { flag: 'covered', word: 'Covered too early', meaning: 'a lift was placed above it before release' },
  hold: { flag: 'hold', word: 'On hold', meaning: 'a verification test fails where the contractor’s passes' },
  partial: { flag: 'partial', word: 'Partly placed', meaning: 'only some quarters of the cell' },
  doubt: { flag: 'doubt', word: 'In doubt', meaning: 'a lift beneath it was covered too early' },
  awaitingAcceptance: { flag: 'awaitingAcceptance', word: 'Hold point', meaning: 'waits for the owner’s acceptance' },
}

/**
 * Forms of the overlay marks, in MARK_INK, lengths in screen pixels unless said.
 * covered: heavy ink edge inside the cell and an ink wedge filling the top left corner;
 * hold: the top right corner split, outer half ink, inner half white; doubt: a broken ink edge inside the cell.
 */
export const OVERLAY_MARKS = {
  covered: { edge: 3, wedgeShare: 0.32, wedgeMax: 16 },
  hold: { cornerShare: 0.36, cornerMax: 16 },
  doubt: { edge: 1.6, dash: [5, 4] },
} as const

/** Step edges: an ink line, hachures of two lengths in turn on the low side. Screen pixels. */
export const STEP_EDGE = { line: 1.3, hachure: 0.7, longLength: 5, shortLength: 2.6, pitch: 5 } as const
