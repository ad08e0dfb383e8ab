import { z } from 'zod'
import { ROLES } from '#shared/policies/role.ts'
import { criterionSchema, frequencyRuleSchema, roundingSchema } from '#shared/schemas/criterion.ts'
import { finiteSchema, idSchema, instantSchema, lineSchema, nameSchema, sitePointSchema } from '#shared/schemas/common.ts'
import { groundTotalsSchema } from '#shared/ground-codec.ts'

export const SITE_LIMITS = { cells: 150_000, zones: 40, ringPoints: 2_000, surfacePoints: 20_000 } as const

export const unitSystemSchema = z.enum(['us', 'si'])
export const planUnitSchema = z.enum(['m', 'ft', 'us-ft'])
const elevationUm = z.number().int().min(-5e8).max(9e9)

export const gridSchema = z.object({
  origin: sitePointSchema,
  cellSize: finiteSchema.positive('A cell has a size above 0').max(10_000),
  columns: z.number().int().min(1).max(2_000),
  rows: z.number().int().min(1).max(2_000),
  rotationDeg: finiteSchema.min(-360).max(360),
  unit: planUnitSchema,
})

export const ringSchema = z.array(sitePointSchema).min(3, 'An outline has three points or more').max(SITE_LIMITS.ringPoints)

export const liftPlanSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('level'), datumUm: elevationUm, thicknessUm: z.number().int().min(25_000).max(3_000_000) }),
  z.object({ kind: z.literal('parallel-to-base'), thicknessUm: z.number().int().min(25_000).max(3_000_000) }),
  z.object({ kind: z.literal('down-from-design'), thicknessUm: z.number().int().min(25_000).max(3_000_000) }),
])

/** A surface: level, or points (easting, northing, elevation) joined by a triangulated network. */
export const surfaceSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('level'), elevationUm }),
  z.object({
    kind: z.literal('points'),
    points: z.array(z.object({ easting: finiteSchema, northing: finiteSchema, elevationUm })).min(3).max(SITE_LIMITS.surfacePoints),
  }),
])

/** Where a release waits for the owner's acceptance. */
export const holdsSchema = z.object({
  foundation: z.boolean(),
  firstLift: z.boolean(),
  everyLift: z.boolean(),
  finalGrade: z.boolean(),
})

export const specificationInputSchema = z.object({
  title: nameSchema,
  criteria: z.array(criterionSchema).min(1, 'A specification has at least one limit').max(12),
  rounding: roundingSchema,
  frequency: z.array(frequencyRuleSchema).min(1, 'Say how often fill is tested').max(8),
  remainderTolerancePercent: finiteSchema.min(0).max(50),
  repeatability: z.object({ rc: finiteSchema.min(0).max(5), moisture: finiteSchema.min(0).max(5) }),
  stakeRetireMm: z.number().int().min(0).max(50_000),
  stakeSetbackMm: z.number().int().min(0).max(20_000),
  requiredOnlyAtStakes: z.boolean(),
})
export type SpecificationInput = z.infer<typeof specificationInputSchema>

export const zoneInputSchema = z.object({
  id: idSchema,
  name: nameSchema,
  /** as lots and lists call it, such as "Pad" */
  shortName: z.string().trim().min(1).max(16),
  purpose: z.enum(['structural-fill', 'roadway', 'embankment', 'trench', 'landscape']),
  ring: ringSchema,
  liftPlan: liftPlanSchema,
  design: surfaceSchema,
  holds: holdsSchema,
  volumeBasis: z.enum(['geometry', 'loads']),
  lotBasis: z.enum(['lift-day', 'lift']),
  specification: specificationInputSchema,
})
export type ZoneInput = z.infer<typeof zoneInputSchema>

export const createSiteSchema = z.object({
  id: idSchema,
  name: nameSchema,
  subtitle: lineSchema,
  crs: z.string().max(20),
  unitSystem: unitSystemSchema,
  timeZone: z.string().max(64),
  dayCutHour: z.number().int().min(0).max(23),
  verticalDatum: lineSchema,
  waterDensity: z.union([z.literal(1000), z.literal(998.2)]),
  grid: gridSchema,
  boundary: ringSchema,
  ground: surfaceSchema,
  zones: z.array(zoneInputSchema).min(1, 'A site has at least one zone').max(SITE_LIMITS.zones),
})
export type CreateSite = z.infer<typeof createSiteSchema>

/** What may still change once a site is made; what is left out stays. */
export const updateSiteSchema = createSiteSchema.pick({ name: true, subtitle: true, unitSystem: true }).partial()
export type UpdateSite = z.infer<typeof updateSiteSchema>

/** A new version of a zone's specification. */
export const createSpecificationSchema = specificationInputSchema.extend({ id: idSchema })
export type CreateSpecification = z.infer<typeof createSpecificationSchema>

export const specificationSchema = specificationInputSchema.extend({
  id: z.string(),
  version: z.number().int(),
  createdAt: instantSchema,
})
export type Specification = z.infer<typeof specificationSchema>

export const zoneSchema = zoneInputSchema.omit({ specification: true, design: true }).extend({
  /** place in the site's zone list, as CellGeometry.zone counts */
  index: z.number().int(),
  minBaseUm: z.number(),
  maxDesignUm: z.number(),
  designCm3: z.number(),
  specification: specificationSchema,
})
export type Zone = z.infer<typeof zoneSchema>

export const siteSchema = z.object({
  id: z.string(),
  name: z.string(),
  subtitle: z.string(),
  role: z.enum(ROLES),
  crs: z.string(),
  unitSystem: unitSystemSchema,
  timeZone: z.string(),
  dayCutHour: z.number(),
  verticalDatum: z.string(),
  waterDensity: z.number(),
  grid: gridSchema,
  boundary: ringSchema,
  areaMm2: z.number(),
  zones: z.array(zoneSchema),
  /** changes when the cells' static geometry does */
  cellsHash: z.string(),
  revision: z.number(),
  now: instantSchema,
})
export type Site = z.infer<typeof siteSchema>

/** Static geometry of every cell, by columns, in cell order. */
export const siteCellsSchema = z.object({
  hash: z.string(),
  column: z.array(z.number()),
  row: z.array(z.number()),
  zone: z.array(z.number()),
  areaMm2: z.array(z.number()),
  centroidU: z.array(z.number()),
  centroidV: z.array(z.number()),
  baseUm: z.array(z.number()),
  designUm: z.array(z.number()),
})
export type SiteCells = z.infer<typeof siteCellsSchema>

export const siteListItemSchema = z.object({
  id: z.string(),
  name: z.string(),
  subtitle: z.string(),
  role: z.enum(ROLES),
  unitSystem: unitSystemSchema,
  areaMm2: z.number(),
  cells: z.number(),
  totals: groundTotalsSchema,
  columns: z.number(),
  rows: z.number(),
})
export const siteListSchema = z.object({ sites: z.array(siteListItemSchema) })
export type SiteListItem = z.infer<typeof siteListItemSchema>
