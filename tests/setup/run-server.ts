import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { setTimeout as sleep } from 'node:timers/promises'
import { inRoot, ROOT } from '#api/setup/paths.mjs'
import { freePort } from '#api/setup/ports.mjs'

export interface RunningServer {
  /** Origin, such as http://127.0.0.1:40123 */
  url: string
  /** Ends it as Ctrl-C would; resolves when its process has ended. */
  stop: () => Promise<void>
  /** What it has printed so far. */
  output: () => string
}

export interface ServerOptions {
  databaseUrl: string
  /** A free one when left out. */
  port?: number
  /** For example { SEED_DEMO: '1', DEMO_NOW: '2026-11-30T15:00:00-07:00' }. */
  env?: Record<string, string>
}

const READY_WITHIN_MS = 120_000

/** Starts the real server in a process of its own, as npm start does, and waits until GET /api/health answers 200. */
export async function startServer({ databaseUrl, port, env = {} }: ServerOptions): Promise<RunningServer> {
  const url = `http://127.0.0.1:${port ?? (await freePort())}`
  const preloads = ['--import', 'tsx', '--import', inRoot('api/setup/follow-parent.mjs')]
  const child = spawn(process.execPath, [...preloads, 'api/main.ts'], {
    cwd: ROOT,
    env: {
      ...process.env,
      TSX_TSCONFIG_PATH: inRoot('api/tsconfig.json'),
      NODE_ENV: 'production',
      DATABASE_URL: databaseUrl,
      SESSION_SECRET: 'only-for-the-browser-tests-0123456789abcdef',
      HOST: '127.0.0.1',
      PORT: new URL(url).port,
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  let printed = ''
  for (const stream of [child.stdout, child.stderr]) stream?.on('data', (chunk: Buffer) => (printed += chunk.toString()))
  const ended = once(child, 'exit')
  const hasEnded = (): boolean => child.exitCode !== null || child.signalCode !== null
  const stop = async (): Promise<void> => {
    if (hasEnded()) return
    const patience = setTimeout(() => child.kill('SIGKILL'), 15_000)
    child.kill('SIGTERM')
    await ended
    clearTimeout(patience)
  }
  const deadline = Date.now() + READY_WITHIN_MS
  while (!(await isHealthy(url))) {
    if (hasEnded() || Date.now() > deadline) {
      await stop()
      throw new Error(`The server did not become ready. It printed:\n${printed}`)
    }
    await sleep(100)
  }
  return { url, stop, output: () => printed }
}

async function isHealthy(url: string): Promise<boolean> {
  try {
    return (await fetch(`${url}/api/health`)).status === 200
  } catch {
    return false
  }
}
