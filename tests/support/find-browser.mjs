import { spawnSync } from 'node:child_process'
import { accessSync, constants } from 'node:fs'
import { createRequire } from 'node:module'
import { delimiter, join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { chromium } from 'playwright-core'

/** The environment variable that names a browser to use instead of any other. */
export const browserVariable = 'GLOWLOOP_BROWSER'

/** Switches off what a browser does on the network of its own accord. */
const quietFlags = [
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-gpu',
]

/**
 * What this module asks of the machine it runs on; a test gives its own.
 *
 * @typedef {object} Machine
 * @property {Readonly<Record<string, string | undefined>>} environment
 * @property {NodeJS.Platform} platform
 * @property {boolean} isRoot
 * @property {string} packaged Where Playwright would keep a browser of its own.
 * @property {(path: string) => boolean} exists
 * @property {(path: string) => boolean} starts Whether the program at that path runs at all.
 * @property {(command: string, args: readonly string[]) => boolean} run Runs it to its end, output
 *   shown; false if it failed.
 */

/**
 * A browser: `executablePath` is absent when it is Playwright's own, which Playwright finds itself.
 *
 * @typedef {{ readonly executablePath?: string, readonly how: string }} Browser
 */

/** @type {Machine} */
const thisMachine = {
  environment: process.env,
  platform: process.platform,
  isRoot: process.getuid?.() === 0,
  packaged: chromium.executablePath(),
  exists: (path) => {
    try {
      accessSync(path, process.platform === 'win32' ? constants.F_OK : constants.X_OK)
      return true
    } catch {
      return false
    }
  },
  starts: (path) => {
    // Only Linux has packages whose program merely says that another package is wanted; elsewhere
    // asking for the version may open a window.
    if (process.platform !== 'linux') return true
    return spawnSync(path, ['--version'], { stdio: 'ignore', timeout: 30_000 }).status === 0
  },
  run: (command, args) =>
    spawnSync(command, args, {
      stdio: ['ignore', 'inherit', 'inherit'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    }).status === 0,
}

/**
 * Where a Chromium, Chrome or Edge may be on this machine, the likeliest first.
 *
 * @param {Machine} machine
 * @returns {readonly string[]}
 */
function places({ environment, platform }) {
  const names = [
    'chromium',
    'chromium-browser',
    'google-chrome',
    'google-chrome-stable',
    'chrome',
    'microsoft-edge',
    'microsoft-edge-stable',
    'msedge',
  ]
  const ending = platform === 'win32' ? '.exe' : ''
  const onPath = (environment.PATH ?? environment.Path ?? '')
    .split(delimiter)
    .filter((folder) => folder !== '')
    .flatMap((folder) => names.map((name) => join(folder, name + ending)))
  if (platform === 'darwin') {
    const usual = ['Chromium', 'Google Chrome', 'Microsoft Edge']
    return [...onPath, ...usual.map((name) => `/Applications/${name}.app/Contents/MacOS/${name}`)]
  }
  if (platform === 'win32') {
    const roots = [
      environment.PROGRAMFILES,
      environment['PROGRAMFILES(X86)'],
      environment.LOCALAPPDATA,
    ]
    const usual = [
      ['Chromium', 'Application', 'chrome.exe'],
      ['Google', 'Chrome', 'Application', 'chrome.exe'],
      ['Microsoft', 'Edge', 'Application', 'msedge.exe'],
    ]
    const found = roots.flatMap((root) => (root ? usual.map((parts) => join(root, ...parts)) : []))
    return [...onPath, ...found]
  }
  return [
    ...onPath,
    '/usr/bin/chromium',
    '/opt/google/chrome/chrome',
    '/opt/microsoft/msedge/msedge',
  ]
}

/**
 * A browser that is already on this machine, or undefined. Throws when the environment variable
 * names one that is not there: quietly taking another would test something else than was asked.
 *
 * @param {Machine} machine
 * @returns {Browser | undefined}
 */
export function findBrowser(machine = thisMachine) {
  const named = machine.environment[browserVariable]
  if (named) {
    if (machine.exists(named)) return { executablePath: named, how: `named by ${browserVariable}` }
    throw new Error(`${browserVariable} names ${named}, which is not there or cannot be run`)
  }
  if (machine.exists(machine.packaged)) return { how: "Playwright's own" }
  const path = places(machine).find((place) => machine.exists(place) && machine.starts(place))
  return path === undefined ? undefined : { executablePath: path, how: 'found on this machine' }
}

/**
 * As `findBrowser`, but fetches one where none is found: as root on a Debian-like system from its
 * own packages, otherwise by Playwright. Undefined when that fails too.
 *
 * @param {Machine} machine
 * @returns {Browser | undefined}
 */
export function findOrFetchBrowser(machine = thisMachine) {
  const found = findBrowser(machine)
  if (found) return found
  if (machine.platform === 'linux' && machine.isRoot && machine.exists('/usr/bin/apt-get')) {
    const packages = ['chromium', 'fonts-dejavu-core']
    machine.run('apt-get', ['update'])
    machine.run('apt-get', ['install', '-y', '--no-install-recommends', ...packages])
    const installed = findBrowser(machine)
    if (installed) return installed
  }
  const playwright = createRequire(import.meta.url).resolve('@playwright/test/cli')
  machine.run(process.execPath, [playwright, 'install', 'chromium'])
  return findBrowser(machine)
}

/**
 * How Playwright has to start that browser.
 *
 * @param {Browser | undefined} browser
 * @param {Machine} machine
 */
export function launchOptions(browser = findBrowser(), machine = thisMachine) {
  return {
    // Chromium refuses its sandbox to root, which is who a build machine runs as.
    args: machine.isRoot ? [...quietFlags, '--no-sandbox'] : quietFlags,
    ...(browser?.executablePath && { executablePath: browser.executablePath }),
  }
}

const runAsProgram =
  process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href
if (runAsProgram) {
  try {
    const browser = findOrFetchBrowser()
    if (browser) {
      console.log(`Browser: ${browser.executablePath ?? thisMachine.packaged} (${browser.how})`)
    } else {
      console.error(
        `No browser for the tests: install Chromium, Chrome or Edge, or set ${browserVariable} to the path of one.`,
      )
      process.exitCode = 1
    }
  } catch (error) {
    console.error(error instanceof Error ? error.message : error)
    process.exitCode = 1
  }
}
