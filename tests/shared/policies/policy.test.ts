import { describe, expect, it } from 'vitest'
import { can, VERBS } from '#shared/policies/policy.ts'
import type { Verb } from '#shared/policies/policy.ts'
import { isRole, ROLE_LABELS, ROLES } from '#shared/policies/role.ts'

// The table "Who may do what" of the product's design, written out by hand: l lead, t technician, s superintendent,
// r owner's representative, o operator. Verbs after the rule follow from the table's rows or from "People".
const TABLE: Record<Verb, string> = {
  'site.see': 'ltsro',
  'registers.see': 'ltsr',
  'site.setup': 'l',
  'people.manage': 'l',
  'placement.record': 'lts',
  'test.record-qc': 'lt',
  'gauge.record': 'lt',
  'curve.record': 'lt',
  'material.record': 'lt',
  'curve.approve': 'l',
  'test.record-qa': 'r',
  'test.void-qc': 'l',
  'test.void-qa': 'r',
  'rework.issue': 'l',
  'rework.edit': 'l',
  'rework.close': 'l',
  'rework.assign': 'ls',
  'rework.work': 'lso',
  'release.issue': 'l',
  'release.ask': 's',
  'release.accept': 'r',
  'disposition.accept-as-is': 'r',
  'daily.sign': 'l',
  'daily.countersign': 'r',

  'people.manage-owner-reps': 'r',
  'placement.void': 'l',
  'inspection.record': 'lt',
  'inspection.void': 'l',
  'stake.draw': 'lt',
  'lot.edit': 'l',
  'release.revoke': 'l',
  'weather.record': 'lts',
  'calibration.record': 'lt',
  'curve.supersede': 'l',
  'test.rejudge': 'l',
  'test.rejudge-qa': 'r',
  'one-point.record': 'lt',
  'file.attach': 'ltr',
  'file.withdraw': 'lr',
  'view.save': 'ltsr',
  'view.share': 'lt',
  'view.edit-shared': 'l',
}

const LETTERS = { 'qc-lead': 'l', technician: 't', superintendent: 's', 'owner-rep': 'r', operator: 'o' } as const

describe('can', () => {
  it.each(VERBS)('lets exactly the roles of the product’s table %s', (verb) => {
    const allowed = ROLES.filter((role) => can(role, verb))
    expect(allowed.map((role) => LETTERS[role]).join('')).toBe(TABLE[verb])
  })

  it('knows a verb for every line of the table and no other', () => {
    expect([...VERBS].sort()).toEqual(Object.keys(TABLE).sort())
  })
})

describe('roles', () => {
  it('have a label each, no two alike', () => {
    expect(new Set(ROLES.map((role) => ROLE_LABELS[role])).size).toBe(5)
  })

  it('are told from other words', () => {
    expect(isRole('operator')).toBe(true)
    expect(isRole('admin')).toBe(false)
  })
})
