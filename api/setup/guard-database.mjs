import { rmSync } from 'node:fs'
import { stopMariadb } from './mariadb.mjs'

// Waits until the command that started it closes the pipe or dies, then ends that command's throw-away database.
const instance = JSON.parse(process.argv[2] ?? '')
process.stdin.resume()
process.stdin.on('end', async () => {
  await stopMariadb(instance)
  rmSync(instance.folder, { recursive: true, force: true })
})
