import { randomBytes } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { startLocalObjectStore } from '#api/setup/object-store.mjs'

/** A store for the files of one run of tests: what the server needs to be told of it, and its end. */
export async function openTestObjectStore(): Promise<{ settings: Record<string, string>; stop: () => Promise<void> }> {
  const folder = await mkdtemp(path.join(tmpdir(), 'hardpan-objects-'))
  const key = () => randomBytes(16).toString('hex')
  const store = await startLocalObjectStore({ folder, accessKey: key(), secretKey: key() })
  return {
    settings: store.settings,
    stop: async () => {
      await store.stop()
      await rm(folder, { recursive: true, force: true })
    },
  }
}
