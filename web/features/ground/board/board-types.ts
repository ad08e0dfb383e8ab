import type { GridDefinition, SitePoint, SiteRing } from '#shared/domain/site-geometry.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'

/** Cells as columns of numbers, indexed by cell. Typed arrays and plain arrays both do. */
export interface BoardCells {
  readonly column: ArrayLike<number>
  readonly row: ArrayLike<number>
  /** index into the site's zones, -1 where none */
  readonly zone: ArrayLike<number>
  /** existing ground, µm; NaN where unknown */
  readonly baseUm: ArrayLike<number>
}

export interface BoardZone {
  readonly id: string
  readonly name: string
  readonly ring: SiteRing
}

/** What is static about a site's plan. Keep the object's identity: a new one builds the map again. */
export interface BoardSite {
  readonly grid: GridDefinition
  /** code of the coordinate system, as shared/domain/coordinate-systems knows it */
  readonly system: string
  readonly boundary: SiteRing
  readonly zones: readonly BoardZone[]
  readonly cells: BoardCells
}

export type MarkOutcome = 'pass' | 'near' | 'fail' | 'suspect' | 'pending'

export interface BoardMark extends SitePoint {
  readonly id: string
  readonly outcome: MarkOutcome
  readonly verification: boolean
  readonly label: string
}

export interface BoardStake extends SitePoint {
  readonly id: string
  readonly label: string
}

export type BoardTheme = 'light' | 'dark'

/**
 * select: a click picks a cell, a drag pans. area: a drag draws a rectangle of cells. point: a click picks a
 * place. Shift-drag draws a rectangle in every mode.
 */
export type BoardMode = 'select' | 'area' | 'point'

/** How a picked area meets the selection there is. */
export type AreaPick = 'replace' | 'add' | 'toggle'

export interface GroundMapProps {
  readonly site: BoardSite
  /**
   * The sheet shown. A new object with another revision of the same cut inks its changed cells in; another cut
   * is drawn at once. Arrays changed in place by applyPatch are fine: the board keeps its own copy to compare.
   */
  readonly sheet: GroundSheet | undefined
  /** where the newest change came from, so that the ink-in starts there */
  readonly changeFrom?: SitePoint | null
  readonly marks?: readonly BoardMark[]
  readonly stakes?: readonly BoardStake[]
  /** the one selected cell */
  readonly selectedCell?: number | undefined
  /** the cells chosen for placing, rework or release */
  readonly selectedCells?: readonly number[]
  /** cells a result being entered would turn to rework */
  readonly highlightCells?: readonly number[]
  /** a picked or typed place, drawn as a small cross */
  readonly pickedPoint?: SitePoint | null
  readonly mode?: BoardMode
  readonly theme?: BoardTheme
  /** the plan stays turned to the grid unless this is true */
  readonly allowRotation?: boolean
  /** text for the reader of the canvas, for example "Ground, working surface" */
  readonly label?: string
  /** pixels kept free of the plan when it is fitted; the margins and the furniture by default */
  readonly fitPadding?: Partial<Record<'top' | 'right' | 'bottom' | 'left', number>>
  readonly onPickCell?: (cell: number) => void
  readonly onPickArea?: (cells: number[], how: AreaPick) => void
  readonly onPickPoint?: (point: SitePoint, cell: number | undefined) => void
  /** an arrow key: move the selection by so many columns and rows */
  readonly onMoveCell?: (columns: number, rows: number) => void
  readonly onOpenTest?: (id: string) => void
  readonly onOpenStake?: (id: string) => void
}

export interface GroundMapHandle {
  /** shows the whole site, turned to the grid */
  readonly fit: () => void
  /** brings a cell into view, moving only when it is outside */
  readonly panToCell: (cell: number) => void
  /** CSS pixels from the map's top left corner */
  readonly projectCellCenter: (cell: number) => { x: number; y: number } | undefined
  /** redraws the named cells from the sheet's arrays without a React render */
  readonly patchCells: (cells: readonly number[], from?: SitePoint | null) => void
}
