import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { GROUND_INKS } from '#shared/look/ground-look.ts'
import { SHEET_COLOURS, STAKE_COLOUR } from '#shared/look/theme.ts'

const css = readFileSync('web/styles.css', 'utf8')
const kebab = (name: string): string => name.replace(/[A-Z]|\d/g, (letter) => `-${letter.toLowerCase()}`)

it('gives CSS the same surfaces and inks as the drawing layer and paper, in both themes', () => {
  const names = Object.keys(SHEET_COLOURS.light) as (keyof typeof SHEET_COLOURS.light)[]
  const expected = names.map((name) => `--${kebab(name)}: light-dark(${SHEET_COLOURS.light[name].css}, ${SHEET_COLOURS.dark[name].css});`)
  expect(expected.filter((line) => !css.includes(line))).toEqual([])
})

it('gives CSS the same colours of the ground', () => {
  const expected = {
    stake: STAKE_COLOUR,
    'g-sand': GROUND_INKS.sand,
    'g-meets-spec': GROUND_INKS.meetsSpec,
    'g-released': GROUND_INKS.released,
    'g-rework': GROUND_INKS.rework,
    'g-suspect': GROUND_INKS.suspect,
  }
  const missing = Object.entries(expected).filter(([name, colour]) => !css.includes(`--${name}: ${colour.css};`))
  expect(missing).toEqual([])
})
