import type { EntityManager } from 'typeorm'
import { ROLES } from '#shared/policies/role.ts'
import type { Role } from '#shared/policies/role.ts'
import type { CreateCurve, CreateMaterial, Curve, Material } from '#shared/schemas/lab.ts'
import type { CreateSite, Site } from '#shared/schemas/site.ts'
import { curveInput } from '#tests/factories/curve.ts'
import { materialInput } from '#tests/factories/material.ts'
import { siteInput } from '#tests/factories/site-input.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

export interface OpenSite {
  readonly site: Site
  readonly siteId: string
  readonly material: Material
  /** approved, 120.0 pcf at 12.0 % */
  readonly curve: Curve
  /** one person of each role, signed in */
  readonly people: Readonly<Record<Role, SignedIn>>
  /** '/api/sites/<id>' + path */
  path(path?: string): string
}

interface OpenSiteOptions {
  readonly site?: Partial<CreateSite>
  readonly material?: Partial<CreateMaterial>
  readonly curve?: Partial<CreateCurve>
}

/** A site made through the application as people make it: plan, five people, a material and an approved curve. */
export async function openSite(app: TestApp, options: OpenSiteOptions = {}): Promise<OpenSite> {
  const input = siteInput(options.site)
  const lead = await app.signedIn()
  const site = (await created(lead.post('/api/sites', input))) as Site
  const siteId = site.id
  const path = (rest = '') => `/api/sites/${siteId}${rest}`
  const others = await Promise.all(
    ROLES.filter((role) => role !== 'qc-lead').map(async (role) => [role, await app.signedIn(role, siteId)] as const),
  )
  const material = (await created(lead.post(path('/materials'), materialInput(options.material)))) as Material
  const draft = (await created(lead.post(path('/curves'), curveInput({ ...options.curve, materialId: material.id })))) as Curve
  const curve = (await created(lead.post(path(`/curves/${draft.id}/approve`), { use: draft.pairFrom }))) as Curve
  return { site, siteId, material, curve, path, people: { ...peopleOf(others), 'qc-lead': lead } }
}

function peopleOf(pairs: readonly (readonly [Role, SignedIn])[]): Record<Exclude<Role, 'qc-lead'>, SignedIn> {
  return Object.fromEntries(pairs) as Record<Exclude<Role, 'qc-lead'>, SignedIn>
}

async function created(answer: ReturnType<SignedIn['post']>): Promise<unknown> {
  const { status, body } = await answer
  if (status !== 200 && status !== 201) throw new Error(`Setting up the site answered ${status}: ${JSON.stringify(body)}`)
  return body
}

/** Everything that stands in a table for a site, for looking behind the application. */
export function rowsOf(manager: EntityManager, table: string, siteId: string): Promise<Record<string, unknown>[]> {
  return manager.query(`SELECT * FROM \`${table}\` WHERE \`site_id\` = ?`, [siteId])
}
