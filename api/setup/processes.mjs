import { readFileSync, readlinkSync } from 'node:fs'
import { setTimeout as sleep } from 'node:timers/promises'

/** @param {string} file */
function readProc(file) {
  try {
    return readFileSync(file, 'utf8')
  } catch {
    return ''
  }
}

/** @param {number} pid @returns {boolean} */
export function isAlive(pid) {
  try {
    process.kill(pid, 0)
  } catch (error) {
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM'
  }
  // In a container whose first process reaps nobody, an ended orphan stays as a zombie: it is not alive.
  return !/^State:\s+Z/m.test(readProc(`/proc/${pid}/status`))
}

/** Words of the process's command line; empty where /proc does not tell. @param {number} pid @returns {string[]} */
export function commandLine(pid) {
  return readProc(`/proc/${pid}/cmdline`).split('\0').filter(Boolean)
}

/** Working directory of a process, null where /proc does not tell. @param {number} pid @returns {string | null} */
export function workingDirectory(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`)
  } catch {
    return null
  }
}

/** @param {number} pid @param {number} withinMs @returns {Promise<boolean>} true when it has ended */
export async function waitForEnd(pid, withinMs) {
  const deadline = Date.now() + withinMs
  while (isAlive(pid)) {
    if (Date.now() > deadline) return false
    await sleep(25)
  }
  return true
}

/** @param {number} pid @param {NodeJS.Signals} signal */
export function signalProcess(pid, signal) {
  try {
    process.kill(pid, signal)
  } catch {
    // It ended in the meantime.
  }
}

/** Asks a process to end, and ends it when it has not within the time given. @param {number} pid @param {number} graceMs */
export async function stopProcess(pid, graceMs) {
  signalProcess(pid, 'SIGTERM')
  if (await waitForEnd(pid, graceMs)) return
  signalProcess(pid, 'SIGKILL')
  await waitForEnd(pid, 5_000)
}
