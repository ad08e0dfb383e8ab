import { readdirSync, readFileSync, readlinkSync } from 'node:fs'
import http from 'node:http'
import net from 'node:net'
import path from 'node:path'
import { commandLine, workingDirectory } from './processes.mjs'
import { SetupError } from './say.mjs'

/** The port a command is asked to use. @param {string | undefined} text value of PORT @param {number} standard @returns {number} */
export function readPort(text, standard) {
  if (text === undefined || text === '') return standard
  const port = Number(text)
  if (/^\d+$/.test(text) && port >= 1 && port <= 65_535) return port
  throw new SetupError(`PORT is "${text}"; it must be a whole number from 1 to 65535.`)
}

/** A port of 127.0.0.1 free at this moment. @returns {Promise<number>} */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = net.createServer()
    server.on('error', reject)
    server.listen(0, '127.0.0.1', () => {
      const { port } = /** @type {net.AddressInfo} */ (server.address())
      server.close(() => resolve(port))
    })
  })
}

/**
 * Takes the port and keeps it until the server is ready to take over; whoever asks meanwhile is told to wait.
 * @param {number} port
 * @param {string} host
 * @returns {Promise<{ release: () => Promise<void> }>}
 */
export function holdPort(port, host) {
  return new Promise((resolve, reject) => {
    const server = http.createServer((_request, response) => {
      response.writeHead(503, { 'content-type': 'text/plain; charset=utf-8', 'retry-after': '5', refresh: '3' })
      response.end('Hardpan is starting. This page reloads by itself.\n')
    })
    server.on('error', (error) => reject(new SetupError(portFailure(error, port, host))))
    server.listen(port, host, () => {
      const release = () => new Promise((/** @type {(value: void) => void} */ done) => {
        server.close(() => done())
        server.closeAllConnections()
      })
      resolve({ release })
    })
  })
}

/** @param {NodeJS.ErrnoException} error @param {number} port @param {string} host */
function portFailure(error, port, host) {
  const otherPort = `choose another port, for example: PORT=${port < 65_535 ? port + 1 : port - 1} npm start`
  if (error.code === 'EADDRINUSE') return `Port ${port} is taken by ${describeHolder(port)}.\nStop it, or ${otherPort}`
  if (error.code === 'EACCES') return `This user may not use port ${port}: ${otherPort}`
  if (error.code === 'EADDRNOTAVAIL' || error.code === 'ENOTFOUND') return `HOST is "${host}", which is not an address of this machine.`
  return `Port ${port} on ${host} cannot be used: ${error.message}`
}

/** Who listens on a port, as far as this user may see. @param {number} port @returns {string} */
export function describeHolder(port) {
  const pid = findListener(port)
  if (pid === null) return 'another program'
  const folder = workingDirectory(pid)
  const name = path.basename(commandLine(pid)[0] ?? 'another program')
  if (folder !== null && name.startsWith('node') && isCheckout(folder)) return `the Hardpan checkout in ${folder} (process ${pid})`
  return `${name} (process ${pid})`
}

/** @param {string} folder */
function isCheckout(folder) {
  try {
    return JSON.parse(readFileSync(path.join(folder, 'package.json'), 'utf8')).name === 'hardpan'
  } catch {
    return false
  }
}

/** Process listening on a port; null where the kernel does not tell. @param {number} port @returns {number | null} */
function findListener(port) {
  const inodes = listeningInodes(port)
  if (inodes.size === 0) return null
  for (const pid of listFolder('/proc').filter((name) => /^\d+$/.test(name))) {
    for (const handle of listFolder(`/proc/${pid}/fd`)) {
      if (inodes.has(readLink(`/proc/${pid}/fd/${handle}`))) return Number(pid)
    }
  }
  return null
}

/** Sockets in state LISTEN (0A) on a port, named as in /proc/PID/fd. @param {number} port */
function listeningInodes(port) {
  const wanted = `:${port.toString(16).toUpperCase().padStart(4, '0')}`
  /** @type {Set<string>} */
  const inodes = new Set()
  for (const table of ['/proc/net/tcp', '/proc/net/tcp6']) {
    for (const line of readText(table).split('\n')) {
      const fields = line.trim().split(/\s+/)
      if (fields[3] === '0A' && fields[1]?.endsWith(wanted)) inodes.add(`socket:[${fields[9]}]`)
    }
  }
  return inodes
}

/** @param {string} folder @returns {string[]} */
function listFolder(folder) {
  try {
    return readdirSync(folder)
  } catch {
    return []
  }
}

/** @param {string} link */
function readLink(link) {
  try {
    return readlinkSync(link)
  } catch {
    return ''
  }
}

/** @param {string} file */
function readText(file) {
  try {
    return readFileSync(file, 'utf8')
  } catch {
    return ''
  }
}
