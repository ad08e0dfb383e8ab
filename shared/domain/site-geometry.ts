/**
 * The plain data the ground computations share. Units: plan lengths integer millimetres in grid axes
 * (u along the columns, v along the rows, v grows with the row number); areas integer mm²;
 * elevations and thicknesses integer micrometres (1 in = 25,400 µm, 1 ft = 304,800 µm, both exact);
 * volumes integer cm³; instants epoch milliseconds.
 */

/** Plan position in grid axes, integer mm. */
export interface GridPoint {
  readonly u: number
  readonly v: number
}

/** Position in the site's coordinate system, in that system's own unit. */
export interface SitePoint {
  readonly easting: number
  readonly northing: number
}

/** Linear units a projected coordinate system counts in. */
export type PlanUnit = 'm' | 'ft' | 'us-ft'

/**
 * The sheet's grid. Its origin is the corner of cell A1 that is away from every other cell (top left on the
 * drawn sheet). Columns run along `rotationDeg`, the grid-system bearing of the +u axis, in degrees
 * counter-clockwise from east; rows run 90° clockwise from it.
 */
export interface GridDefinition {
  readonly origin: SitePoint
  /** side of a cell in the site's unit, above 0 */
  readonly cellSize: number
  readonly columns: number
  readonly rows: number
  readonly rotationDeg: number
  readonly unit: PlanUnit
}

/** A ring in site coordinates, open (first point not repeated), three or more points, either direction. */
export type SiteRing = readonly SitePoint[]

/** How a zone's fill is cut into lifts. */
export type LiftPlan =
  | { readonly kind: 'level'; readonly datumUm: number; readonly thicknessUm: number }
  | { readonly kind: 'parallel-to-base'; readonly thicknessUm: number }
  | { readonly kind: 'down-from-design'; readonly thicknessUm: number }

/** One planned layer of one cell. Lift 0 is the prepared foundation and has no layer. */
export interface Layer {
  readonly lift: number
  readonly bottomUm: number
  readonly topUm: number
}

/** What never changes about a cell while work goes on. */
export interface CellGeometry {
  /** dense index, row-major over the cells inside the boundary */
  readonly cell: number
  readonly column: number
  readonly row: number
  /** index into the site's zone list, or -1 where no zone holds the centroid */
  readonly zone: number
  /** planar area of the cell cut by the boundary, mm² */
  readonly areaMm2: number
  /** centroid of the clipped area, grid axes */
  readonly centroid: GridPoint
  /** existing (or stripped) ground at the cell, µm */
  readonly baseUm: number
  /** design top of fill at the cell, µm */
  readonly designUm: number
}
