import { chromium } from 'playwright-core'
import type { Browser } from 'playwright-core'
import { CHROMIUM_NEED, missingMessage } from '#api/setup/debian.mjs'
import { findProgram, isProgram } from '#api/setup/commands.mjs'

/** Chromium for the browser tests: CHROMIUM_PATH, or Debian's. Fails with what to do when there is none. */
export async function launchBrowser(): Promise<Browser> {
  const executablePath = process.env.CHROMIUM_PATH || findProgram(CHROMIUM_NEED.program)
  if (executablePath === null || !isProgram(executablePath)) {
    throw new Error(missingMessage([CHROMIUM_NEED], [CHROMIUM_NEED.debianPackage], findProgram('apt-get') !== null))
  }
  return chromium.launch({
    executablePath,
    // No sandbox: it refuses root, and containers without user namespaces. Only pages of our own server are opened.
    args: ['--no-sandbox', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--disable-dev-shm-usage'],
  })
}
