/** Red, green, blue, each an integer 0 to 255 (sRGB). */
export type Rgb = readonly [number, number, number]

/** One colour in the two forms its readers need: numbers for the shader and paper, text for CSS and SVG. */
export type Colour = { readonly css: string; readonly rgb: Rgb }

/**
 * Reads a colour from its hexadecimal text.
 * @param css `#rrggbb`, lower or upper case.
 * @throws RangeError on any other text (a programmer's error: colours are constants).
 */
export function colourOf(css: string): Colour {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(css)
  if (match === null) throw new RangeError(`Not a colour: ${css}`)
  const [, red = '', green = '', blue = ''] = match
  return { css, rgb: [parseInt(red, 16), parseInt(green, 16), parseInt(blue, 16)] }
}

function linearChannel(channel: number): number {
  const value = channel / 255
  return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4
}

/**
 * Linear-light red, green, blue, each 0 to 1, of an sRGB colour.
 * Source: IEC 61966-2-1 transfer function.
 */
export function linearRgb(rgb: Rgb): Rgb {
  return [linearChannel(rgb[0]), linearChannel(rgb[1]), linearChannel(rgb[2])]
}

/**
 * Relative luminance, 0 (black) to 1 (white).
 * Source: WCAG 2.2, definition of relative luminance.
 */
export function relativeLuminance(rgb: Rgb): number {
  const [red, green, blue] = linearRgb(rgb)
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue
}

/**
 * Contrast ratio of two colours, 1 to 21, in either order.
 * Source: WCAG 2.2, definition of contrast ratio.
 */
export function contrastRatio(one: Rgb, other: Rgb): number {
  const a = relativeLuminance(one)
  const b = relativeLuminance(other)
  return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05)
}
