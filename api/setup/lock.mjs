import { randomUUID } from 'node:crypto'
import { linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { commandLine, isAlive } from './processes.mjs'
import { say, SetupError } from './say.mjs'

/** @typedef {{ pid: number, about: string }} Holder */

/**
 * Takes a lock file, or tells who holds it. A lock left by a process that has ended is taken over.
 * @param {string} file
 * @param {string} about what the holder is doing, for the other's message
 * @returns {{ release: () => void } | { holder: Holder }}
 */
export function tryLock(file, about) {
  mkdirSync(path.dirname(file), { recursive: true })
  // The lock appears with its content in one step, so that nobody reads it half written.
  const draft = `${file}.${randomUUID()}`
  writeFileSync(draft, JSON.stringify({ pid: process.pid, about }))
  try {
    for (let attempt = 0; attempt < 5; attempt += 1) {
      if (placed(draft, file)) return { release: releaser(file) }
      const holder = readHolder(file)
      if (holder !== null && isHolding(holder)) return { holder }
      rmSync(file, { force: true })
    }
  } finally {
    rmSync(draft, { force: true })
  }
  throw new SetupError(`The lock ${file} cannot be taken. Remove it if nothing of Hardpan is running.`)
}

/** Removes the lock once; at the latest when the process exits. @param {string} file */
function releaser(file) {
  const release = () => {
    process.off('exit', release)
    rmSync(file, { force: true })
  }
  process.on('exit', release)
  return release
}

/** Waits for the lock, saying so once. @param {string} file @param {string} about @param {number} withinMs */
export async function waitForLock(file, about, withinMs) {
  const deadline = Date.now() + withinMs
  for (let told = false; ; told = true) {
    const result = tryLock(file, about)
    if ('release' in result) return result.release
    if (!told) say(`Waiting for process ${result.holder.pid}, which is ${result.holder.about}.`)
    if (Date.now() > deadline) throw new SetupError(`Process ${result.holder.pid} still holds ${file}.`)
    await sleep(250)
  }
}

/** Who holds a lock now, null when nobody does. @param {string} file @returns {Holder | null} */
export function lockHolder(file) {
  const holder = readHolder(file)
  return holder !== null && isHolding(holder) ? holder : null
}

/** @param {string} draft @param {string} file */
function placed(draft, file) {
  try {
    linkSync(draft, file)
    return true
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EEXIST') return false
    throw error
  }
}

/** @param {string} file @returns {Holder | null} */
function readHolder(file) {
  try {
    const value = JSON.parse(readFileSync(file, 'utf8'))
    return Number.isInteger(value.pid) && value.pid > 0 ? value : null
  } catch {
    return null
  }
}

/** A number may have been given to another program since: where /proc tells, the holder must be a Node process. @param {Holder} holder */
function isHolding({ pid }) {
  if (pid === process.pid) return true
  if (!isAlive(pid)) return false
  const words = commandLine(pid)
  return words.length === 0 || words.some((word) => /node|vitest/.test(word))
}
