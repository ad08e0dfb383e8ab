import type { EntityManager } from 'typeorm'
import type { LotTest, TestPurpose } from '#shared/domain/lot-facts.ts'
import type { Outcome } from '#shared/domain/verdict-types.ts'

interface TestRow {
  readonly id: string
  readonly seq: number
  readonly chain_id: string
  readonly follow_kind: 'retest' | 'rerun' | null
  readonly purpose: TestPurpose
  readonly lift: number
  readonly cell: number
  readonly u: string
  readonly v: string
  readonly sampled_at: Date
  readonly outcome: Outcome
  readonly treated_as_fail: number
  readonly near: number
}

interface ReportRow {
  readonly order_id: string
  readonly cause_chain: string | null
  readonly lift: number
  readonly reported_at: Date
  readonly cell: number
}

/**
 * The test points in these cells of a lift: of each chain the last non-void result, where that lies here. A test is
 * superseded once rework was reported done in its cell, at its lift or below it, after it was sampled.
 */
export async function loadLotTests(
  manager: EntityManager,
  siteId: string,
  lift: number,
  cells: readonly number[],
): Promise<LotTest[]> {
  if (cells.length === 0) return []
  const rows: TestRow[] = await manager.query(
    'SELECT t.`id`, t.`seq`, t.`chain_id`, t.`follow_kind`, t.`purpose`, t.`lift`, t.`cell`, t.`u`, t.`v`, t.`sampled_at`, t.`outcome`, t.`treated_as_fail`, t.`near` FROM `field_test` t WHERE t.`site_id` = ? AND t.`lift` = ? AND t.`cell` IN (?) AND t.`voided_at` IS NULL AND t.`id` = (SELECT n.`id` FROM `field_test` n WHERE n.`site_id` = t.`site_id` AND n.`chain_id` = t.`chain_id` AND n.`voided_at` IS NULL ORDER BY n.`sampled_at` DESC, n.`seq` DESC LIMIT 1) ORDER BY t.`seq`',
    [siteId, lift, cells],
  )
  if (rows.length === 0) return []
  const reports = await loadReports(manager, siteId, lift, [...new Set(rows.map((row) => row.cell))])
  return rows.map((row): LotTest => {
    const sampledAt = row.sampled_at.getTime()
    const firstCells = row.follow_kind === 'retest' ? cellsOfOrder(reports, row.chain_id) : undefined
    return {
      testId: row.id,
      seq: row.seq,
      at: { u: Number(row.u), v: Number(row.v) },
      cell: row.cell,
      sampledAt,
      purpose: row.purpose,
      outcome: row.treated_as_fail ? 'fail' : row.outcome,
      near: Boolean(row.near),
      superseded: reports.some((report) => report.cell === row.cell && report.reported_at.getTime() >= sampledAt),
      ...(firstCells ? { firstCells } : {}),
    }
  })
}

/** Rework reported done at this lift or below, in the cells it was done in; also whole orders a chain answers. */
async function loadReports(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<ReportRow[]> {
  return manager.query(
    "SELECT o.`id` AS `order_id`, t.`chain_id` AS `cause_chain`, o.`lift`, s.`happened_at` AS `reported_at`, c.`cell` FROM `rework_step` s JOIN `rework_order` o ON o.`site_id` = s.`site_id` AND o.`id` = s.`order_id` JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND (c.`left_at` IS NULL OR c.`left_at` > s.`happened_at`) LEFT JOIN `field_test` t ON t.`site_id` = o.`site_id` AND t.`id` = o.`cause_test_id` WHERE s.`site_id` = ? AND s.`kind` = 'ready' AND o.`lift` <= ? AND o.`id` IN (SELECT `order_id` FROM `rework_cell` WHERE `site_id` = ? AND `cell` IN (?))",
    [siteId, lift, siteId, cells],
  )
}

function cellsOfOrder(reports: readonly ReportRow[], chainId: string): number[] | undefined {
  const own = reports.filter((report) => report.cause_chain === chainId)
  return own.length > 0 ? [...new Set(own.map((report) => report.cell))].sort((a, b) => a - b) : undefined
}
