import { describe, expect, it } from 'vitest'
import { browserVariable, findBrowser, findOrFetchBrowser, launchOptions } from './find-browser.mjs'

/** A machine without any browser, on which some things are there and commands can add to them. */
function machine({
  there = [] as readonly string[],
  stubs = [] as readonly string[],
  isRoot = false,
  named = undefined as string | undefined,
  installs = {} as Readonly<Record<string, string>>,
}) {
  const present = new Set(there)
  const ran: string[] = []
  return {
    ran,
    environment: { PATH: '/one:/two', [browserVariable]: named },
    platform: 'linux' as const,
    isRoot,
    packaged: '/packaged/chrome',
    exists: (path: string) => present.has(path),
    starts: (path: string) => !stubs.includes(path),
    run: (command: string, args: readonly string[]) => {
      const name = command === process.execPath ? 'playwright' : command
      const line = `${name} ${args.filter((arg) => !arg.includes('node_modules')).join(' ')}`
      ran.push(line)
      const made = Object.entries(installs).find(([start]) => line.startsWith(start))?.[1]
      if (made) present.add(made)
      return true
    },
  }
}

describe.skipIf(process.platform === 'win32')('the search for a browser', () => {
  it('takes the one that is named before any other', () => {
    const found = findBrowser(machine({ there: ['/mine', '/packaged/chrome'], named: '/mine' }))
    expect(found?.executablePath).toBe('/mine')
  })

  it('takes no other when the one that is named is missing', () => {
    const missing = machine({ there: ['/packaged/chrome', '/one/chromium'], named: '/mine' })
    expect(() => findBrowser(missing)).toThrow('/mine, which is not there')
    expect(() => findOrFetchBrowser(missing)).toThrow('/mine, which is not there')
    expect(missing.ran).toEqual([])
  })

  it("leaves Playwright's own to be found by Playwright", () => {
    const here = machine({ there: ['/packaged/chrome', '/one/chromium'] })
    expect(findBrowser(here)).not.toHaveProperty('executablePath')
    expect(launchOptions(findBrowser(here), here)).not.toHaveProperty('executablePath')
  })

  it('looks along the PATH and passes over what does not start', () => {
    const here = machine({
      there: ['/one/chromium-browser', '/two/google-chrome'],
      stubs: ['/one/chromium-browser'],
    })
    expect(findBrowser(here)?.executablePath).toBe('/two/google-chrome')
    expect(launchOptions(findBrowser(here), here).executablePath).toBe('/two/google-chrome')
  })

  it('installs the package of a Debian-like system as root', () => {
    const here = machine({
      there: ['/usr/bin/apt-get'],
      isRoot: true,
      installs: { 'apt-get install': '/usr/bin/chromium' },
    })
    expect(findOrFetchBrowser(here)?.executablePath).toBe('/usr/bin/chromium')
    expect(here.ran).toEqual([
      'apt-get update',
      'apt-get install -y --no-install-recommends chromium fonts-dejavu-core',
    ])
  })

  it('otherwise has Playwright fetch its own', () => {
    const here = machine({
      there: ['/usr/bin/apt-get'],
      installs: { 'playwright install': '/packaged/chrome' },
    })
    expect(findOrFetchBrowser(here)).toEqual({ how: "Playwright's own" })
    expect(here.ran).toEqual(['playwright install chromium'])
  })

  it('finds nothing where nothing can be fetched', () => {
    expect(findOrFetchBrowser(machine({ isRoot: true, there: ['/usr/bin/apt-get'] }))).toBe(
      undefined,
    )
  })

  it('gives up the sandbox for root alone', () => {
    expect(launchOptions(undefined, machine({ isRoot: true })).args).toContain('--no-sandbox')
    expect(launchOptions(undefined, machine({})).args).not.toContain('--no-sandbox')
  })
})
