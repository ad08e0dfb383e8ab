import { mkdtempSync, rmSync } from 'node:fs'
import os from 'node:os'
import path from 'node:path'
import { onTestFinished } from 'vitest'

/** A folder of its own for the running test, removed after it. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'hardpan-check-'))
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }))
  return folder
}
