import path from 'node:path'
import { fileURLToPath } from 'node:url'

export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..')
export const DATA = path.join(ROOT, '.data')
export const BUILD = path.join(ROOT, '.build')
export const START_LOCK = path.join(DATA, 'start.lock')

/** Path of a file of this checkout. @param {string[]} parts */
export const inRoot = (...parts) => path.join(ROOT, ...parts)
