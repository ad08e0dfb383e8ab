import { describe, expect, it } from 'vitest'
import { GROUND_FLAGS, GROUND_STATES, type GroundState } from '#shared/domain/ground-state.ts'
import { colourOf, contrastRatio, linearRgb, relativeLuminance, type Rgb } from '#shared/look/colour.ts'
import { OVERLAY_LOOKS, stateLook } from '#shared/look/ground-look.ts'
import { SHEET_COLOURS, STAKE_COLOUR, THEMES, WHITE } from '#shared/look/theme.ts'

type Matrix = readonly [Rgb, Rgb, Rgb]

/**
 * Full-severity (1.0) simulation matrices for linear RGB.
 * Source: Machado, Oliveira and Fernandes, "A Physiologically-based Model for Simulation of Color Vision Deficiency",
 * IEEE Transactions on Visualization and Computer Graphics 15 (6), 2009, table of matrices.
 */
const EYES: Readonly<Record<string, Matrix>> = {
  'full colour vision': [[1, 0, 0], [0, 1, 0], [0, 0, 1]],
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanopia: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
  // Source: WCAG 2.2 relative luminance weights.
  greyscale: [[0.2126, 0.7152, 0.0722], [0.2126, 0.7152, 0.0722], [0.2126, 0.7152, 0.0722]],
}

function seen(rgb: Rgb, eye: Matrix): Rgb {
  const light = linearRgb(rgb)
  const row = (weights: Rgb): number =>
    Math.min(1, Math.max(0, weights[0] * light[0] + weights[1] * light[1] + weights[2] * light[2]))
  return [row(eye[0]), row(eye[1]), row(eye[2])]
}

/** CIELAB of linear RGB, D65. Source: IEC 61966-2-1 (sRGB to XYZ) and ISO/CIE 11664-4. */
function lab([red, green, blue]: Rgb): Rgb {
  const f = (t: number): number => (t > 216 / 24389 ? Math.cbrt(t) : ((24389 / 27) * t + 16) / 116)
  const x = f((0.4124 * red + 0.3576 * green + 0.1805 * blue) / 0.95047)
  const y = f(0.2126 * red + 0.7152 * green + 0.0722 * blue)
  const z = f((0.0193 * red + 0.1192 * green + 0.9505 * blue) / 1.08883)
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)]
}

function difference(one: Rgb, other: Rgb, eye: Matrix): number {
  const a = lab(seen(one, eye))
  const b = lab(seen(other, eye))
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])
}

const placed = GROUND_STATES.filter((state) => state !== 'none')
const pairs = placed.flatMap((one, index) => placed.slice(index + 1).map((other): [GroundState, GroundState] => [one, other]))
/** CIE76: about 2.3 is just noticeable side by side; ten and more is plain at a glance (Mahy et al. 1994 for 2.3). */
const PLAIN = 10

describe('the look of the ground', () => {
  it('gives every state a word and a meaning of its own', () => {
    const looks = GROUND_STATES.map((state) => stateLook(state))
    expect(new Set(looks.map((look) => look.word)).size).toBe(GROUND_STATES.length)
    expect(looks.filter((look) => look.meaning.trim() === '')).toEqual([])
  })

  it('has words for every overlay of the ground', () => {
    expect(Object.keys(OVERLAY_LOOKS).sort()).toEqual(Object.keys(GROUND_FLAGS).sort())
  })

  it('keeps the colours of placed ground in both themes', () => {
    for (const state of placed.filter((each) => each !== 'not-placed')) {
      expect(stateLook(state, 'dark')).toEqual(stateLook(state, 'light'))
    }
  })

  for (const theme of THEMES) {
    for (const [name, eye] of Object.entries(EYES)) {
      it(`tells every two states apart in ${name}, ${theme} theme, by fill or by hatch`, () => {
        const alike = pairs.filter(([one, other]) => {
          const a = stateLook(one, theme)
          const b = stateLook(other, theme)
          return difference(a.fill.rgb, b.fill.rgb, eye) < PLAIN && a.hatch.kind === b.hatch.kind
        })
        expect(alike).toEqual([])
      })

      it(`shows every hatch on its fill in ${name}, ${theme} theme`, () => {
        const faint = placed.filter((state) => {
          const look = stateLook(state, theme)
          return look.hatch.kind !== 'none' && difference(look.fill.rgb, look.hatch.mark.rgb, eye) < PLAIN
        })
        expect(faint).toEqual([])
      })
    }
  }

  it('steps from sand to pale green to deep green in luminance too', () => {
    const light = (state: GroundState): number => relativeLuminance(stateLook(state).fill.rgb)
    expect(light('awaiting-test') - light('meets-spec')).toBeGreaterThan(0.15)
    expect(light('meets-spec') - light('released')).toBeGreaterThan(0.3)
  })

  it('shows the lines of near a limit on every placed state', () => {
    for (const state of placed.filter((each) => each !== 'not-placed')) {
      const look = stateLook(state)
      expect(contrastRatio(look.fill.rgb, look.nearHatch.mark.rgb), state).toBeGreaterThan(2)
    }
  })

  it('letters every state at 4.5 to 1 or better', () => {
    for (const state of GROUND_STATES) {
      const look = stateLook(state)
      expect(contrastRatio(look.fill.rgb, look.label.rgb), state).toBeGreaterThanOrEqual(4.5)
    }
  })
})

describe('ink on film', () => {
  it.each(THEMES)('reads at 7 to 1 or better on every surface of the %s theme', (theme) => {
    const colours = SHEET_COLOURS[theme]
    for (const surface of [colours.film, colours.sheet, colours.raised]) {
      for (const text of [colours.ink, colours.ink2, colours.bad, colours.warn]) {
        expect(contrastRatio(text.rgb, surface.rgb), `${text.css} on ${surface.css}`).toBeGreaterThanOrEqual(7)
      }
      expect(contrastRatio(colours.ink3.rgb, surface.rgb)).toBeGreaterThanOrEqual(4.5)
      expect(contrastRatio(colours.good.rgb, surface.rgb)).toBeGreaterThanOrEqual(7)
    }
  })

  it('letters a stake in white at 4.5 to 1 or better', () => {
    expect(contrastRatio(STAKE_COLOUR.rgb, WHITE.rgb)).toBeGreaterThanOrEqual(4.5)
  })
})

describe('colour arithmetic', () => {
  // Source: WCAG 2.2: black on white is 21 to 1, a colour on itself 1 to 1.
  it('reaches the ends of the contrast scale', () => {
    expect(contrastRatio([0, 0, 0], [255, 255, 255])).toBeCloseTo(21, 10)
    expect(contrastRatio([20, 33, 42], [20, 33, 42])).toBe(1)
  })

  it('reads hexadecimal text and refuses anything else', () => {
    expect(colourOf('#1d6763').rgb).toEqual([29, 103, 99])
    expect(() => colourOf('teal')).toThrow(RangeError)
  })
})
