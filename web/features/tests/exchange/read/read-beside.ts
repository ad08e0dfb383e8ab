import { readTable, type ReadTable } from './read-table.ts'

/** A table is read within this, or not at all. */
const LONGEST_MS = 30_000
const TOO_LONG: ReadTable = { ok: false, message: 'This takes too long to read. Save the tests alone, as CSV, and choose that file.' }
const BROKEN: ReadTable = { ok: false, message: 'This file cannot be read. Save the tests as CSV UTF-8 and choose that file.' }

/** Reads a table in a worker of its own, ended when it takes too long; in the page itself where there are no workers. */
export async function readBeside(bytes: Uint8Array, name: string): Promise<ReadTable> {
  if (typeof Worker === 'undefined') return readTable(bytes, name).catch(() => BROKEN)
  const worker = new Worker(new URL('./read-table.worker.ts', import.meta.url), { type: 'module' })
  try {
    return await new Promise<ReadTable>((resolve) => {
      const timer = setTimeout(() => resolve(TOO_LONG), LONGEST_MS)
      const answer = (table: ReadTable): void => {
        clearTimeout(timer)
        resolve(table)
      }
      worker.addEventListener('message', ({ data }: MessageEvent<ReadTable>) => answer(data))
      worker.addEventListener('error', () => answer(BROKEN))
      worker.postMessage({ bytes, name })
    })
  } finally {
    worker.terminate()
  }
}
