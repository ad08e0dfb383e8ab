import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { tryLock } from './lock.mjs'
import { DATA, START_LOCK } from './paths.mjs'
import { SetupError } from './say.mjs'

const RUN_FILE = path.join(DATA, 'run.json')

/**
 * Keeps this checkout for one command that uses its private database; a second one is told where the first runs.
 * @param {import('./lifetime.mjs').Lifetime} lifetime
 */
export function takeCheckout(lifetime) {
  mkdirSync(DATA, { recursive: true, mode: 0o700 })
  const result = tryLock(START_LOCK, 'running Hardpan')
  if ('holder' in result) throw new SetupError(`Hardpan already runs from this folder${runningAt()} (process ${result.holder.pid}). Stop that one first.`)
  lifetime.onEnd(() => {
    rmSync(RUN_FILE, { force: true })
    result.release()
  })
}

/** @param {string} url */
export function noteAddress(url) {
  writeFileSync(RUN_FILE, JSON.stringify({ pid: process.pid, url }))
}

function runningAt() {
  try {
    return ` at ${JSON.parse(readFileSync(RUN_FILE, 'utf8')).url}`
  } catch {
    return ''
  }
}
