/** A side of a cell on the drawn sheet. */
export type GridSide = 'right' | 'left' | 'up' | 'down'

const TURN: Readonly<Record<GridSide, number>> = { right: 0, up: 90, left: 180, down: 270 }
const WINDS = ['east', 'north-east', 'north', 'north-west', 'west', 'south-west', 'south', 'south-east'] as const

export type Wind = (typeof WINDS)[number]

/**
 * The compass word of a side of the sheet, by grid north.
 * @param side side on the drawn sheet, where columns run to the right and rows downward
 * @param rotationDeg the grid's rotation: bearing of the columns, degrees counter-clockwise from east
 * @returns the nearest of the eight winds
 */
export function compassSide(side: GridSide, rotationDeg: number): Wind {
  const angle = (((TURN[side] + rotationDeg) % 360) + 360) % 360
  return WINDS[Math.round(angle / 45) % WINDS.length] ?? 'east'
}
