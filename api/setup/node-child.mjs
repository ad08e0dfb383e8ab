import { spawn } from 'node:child_process'
import { ROOT, inRoot } from './paths.mjs'

const STOP_WITHIN_MS = 15_000

/**
 * Runs a TypeScript file of this checkout in its own process group: only this command tells it to end.
 * @param {string[]} args arguments of node after the loader, the file first
 * @param {NodeJS.ProcessEnv} env
 * @param {import('./lifetime.mjs').Lifetime} lifetime
 * @returns {Promise<number>} its exit code
 */
export function runNode(args, env, lifetime) {
  lifetime.check()
  const child = spawn(process.execPath, ['--import', 'tsx', '--import', inRoot('api/setup/follow-parent.mjs'), ...args], {
    cwd: ROOT,
    env: { ...env, TSX_TSCONFIG_PATH: inRoot('api/tsconfig.json') },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    detached: true,
  })
  const ended = new Promise((/** @type {(code: number) => void} */ resolve) => {
    child.on('exit', (code) => resolve(code ?? 1))
    child.on('error', () => resolve(1))
  })
  lifetime.onHurry(() => child.kill('SIGKILL'))
  lifetime.onEnd(async () => {
    const patience = setTimeout(() => child.kill('SIGKILL'), STOP_WITHIN_MS)
    child.kill('SIGTERM')
    await ended
    clearTimeout(patience)
  })
  return ended
}
