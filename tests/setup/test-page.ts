import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { build, preview } from 'vite'

const PAGES = path.resolve(import.meta.dirname, '../e2e/pages')

/** As strict as the server's own policy: no eval, nothing from elsewhere. */
const POLICY = [
  "default-src 'self'",
  "script-src 'self'",
  "style-src 'self'",
  "worker-src 'self' blob:",
  "img-src 'self' data: blob:",
  "connect-src 'self'",
].join('; ')

export interface TestPage {
  readonly url: string
  readonly close: () => Promise<void>
}

/** Builds one page of tests/e2e/pages as the client is built and serves it on a free port of this machine. */
export async function serveTestPage(name: string): Promise<TestPage> {
  const outDir = await mkdtemp(path.join(tmpdir(), 'test-page-'))
  const shared = { configFile: false, root: PAGES, logLevel: 'error' } as const
  await build({
    ...shared,
    plugins: [react(), tailwindcss()],
    build: { outDir, emptyOutDir: true, chunkSizeWarningLimit: 3000, rolldownOptions: { input: path.join(PAGES, `${name}.html`) } },
  })
  const server = await preview({
    ...shared,
    build: { outDir },
    preview: { host: '127.0.0.1', port: 0, headers: { 'Content-Security-Policy': POLICY } },
  })
  const address = server.httpServer.address()
  const port = typeof address === 'object' && address !== null ? address.port : 0
  return {
    url: `http://127.0.0.1:${port}/${name}.html`,
    close: async () => {
      await server.close()
      await rm(outDir, { recursive: true, force: true })
    },
  }
}
