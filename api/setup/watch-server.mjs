import { spawn } from 'node:child_process'

// Stands between npm run dev and node --watch, which would outlive a dev command killed without a word: this process notices
// (follow-parent.mjs is loaded into it) and ends the watcher, which ends the API.
const watcher = spawn(process.execPath, ['--watch', '--watch-preserve-output', '--import', 'tsx', ...process.argv.slice(2)], { stdio: 'inherit' })
process.on('SIGTERM', () => watcher.kill('SIGTERM'))
watcher.on('exit', (code) => process.exit(code ?? 1))
