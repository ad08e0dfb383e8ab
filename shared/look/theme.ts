import { colourOf, type Colour } from '#shared/look/colour.ts'

/** Light for trailer and sun, dark for the cab at night. */
export const THEMES = ['light', 'dark'] as const
export type Theme = (typeof THEMES)[number]

/** Surfaces, ink and lines of a theme. The same names are CSS variables in web/styles.css. */
export type SheetColours = {
  /** the page behind everything: drafting film */
  readonly film: Colour
  /** the sheet the Ground is drawn on */
  readonly sheet: Colour
  /** panels, header, fields */
  readonly raised: Colour
  readonly ink: Colour
  /** second-rank text, still 7:1 on film */
  readonly ink2: Colour
  /** hints and dotted edges, 4.5:1 on film */
  readonly ink3: Colour
  readonly rule: Colour
  readonly rule2: Colour
  /** words about failure, 7:1 on film */
  readonly bad: Colour
  /** words about doubt, 7:1 on film */
  readonly warn: Colour
  /** words about ground that is in order, 7:1 on raised */
  readonly good: Colour
}

/** The ink and film of each theme. */
export const SHEET_COLOURS: Readonly<Record<Theme, SheetColours>> = {
  light: {
    film: colourOf('#eef1ee'),
    sheet: colourOf('#f9faf8'),
    raised: colourOf('#ffffff'),
    ink: colourOf('#14212a'),
    ink2: colourOf('#3f4f59'),
    ink3: colourOf('#5c6b73'),
    rule: colourOf('#d3dad7'),
    rule2: colourOf('#a9b6b4'),
    bad: colourOf('#8c320b'),
    warn: colourOf('#644c10'),
    good: colourOf('#155854'),
  },
  dark: {
    film: colourOf('#10191f'),
    sheet: colourOf('#1a272f'),
    raised: colourOf('#17222a'),
    ink: colourOf('#f3f6f4'),
    ink2: colourOf('#a9b9bc'),
    ink3: colourOf('#82959b'),
    rule: colourOf('#34454d'),
    rule2: colourOf('#51656d'),
    bad: colourOf('#ffb08a'),
    warn: colourOf('#ead9ad'),
    good: colourOf('#8cc0b8'),
  },
}

/** Survey pink: only ever "go here next". The same in both themes. */
export const STAKE_COLOUR: Colour = colourOf('#d4127f')
/** The ink of marks laid over the ground's colours, which do not change with the theme: neither does this. */
export const MARK_INK: Colour = SHEET_COLOURS.light.ink
/** The halo and lettering on a stake and on marks laid over the ground, in both themes. */
export const WHITE: Colour = colourOf('#ffffff')
