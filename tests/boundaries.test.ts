import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { cruise, type ICruiseResult } from 'dependency-cruiser'
import extractOptions from 'dependency-cruiser/config-utl/extract-depcruise-options'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'

const options = await extractOptions('./.dependency-cruiser.cjs')

/** Runs the project's own rules over `src` in a folder. */
async function check(baseDir: string): Promise<ICruiseResult> {
  const { output } = await cruise(['src'], { ...options, baseDir })
  if (typeof output === 'string') throw new Error('a result was asked for, not a text')
  return output
}

describe('the check of the boundaries', () => {
  let folder = ''

  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'boundaries-'))
    writeFileSync(join(folder, 'tsconfig.json'), '{}')
  })

  afterEach(() => rmSync(folder, { recursive: true }))

  /** Writes a small source tree and names the rules it breaks, each once. */
  async function brokenBy(files: Readonly<Record<string, string>>): Promise<readonly string[]> {
    for (const [path, text] of Object.entries(files)) {
      mkdirSync(dirname(join(folder, path)), { recursive: true })
      writeFileSync(join(folder, path), text)
    }
    const { summary } = await check(folder)
    expect(summary.totalCruised).toBeGreaterThanOrEqual(Object.keys(files).length)
    return [...new Set(summary.violations.map(({ rule }) => rule.name))].sort()
  }

  const nothing = 'export const nothing = 0\n'

  it('accepts every arrow that is allowed', async () => {
    expect(
      await brokenBy({
        'src/main.tsx': "import './panels/panel'\n",
        'src/panels/panel.tsx':
          "import '../chart/curve'\nimport '../state/store'\nimport '../worker/long'\n",
        'src/chart/curve.tsx': "import '../core/sum'\n",
        'src/state/store.ts': "import '../io/link'\nimport '../core/sum'\n",
        'src/io/link.ts': "import '../core/sum'\n",
        'src/worker/long.ts': "import '../core/sum'\n",
        'src/core/sum.ts': "import './part'\n",
        'src/core/part.ts': nothing,
      }),
    ).toEqual([])
  })

  it('refuses a package in core', async () => {
    const rules = await brokenBy({ 'src/core/sum.ts': "import 'react'\n" })
    expect(rules).toContain('core-stands-alone')
  })

  it('refuses a module of Node in core', async () => {
    const rules = await brokenBy({ 'src/core/sum.ts': "import 'node:fs'\n" })
    expect(rules).toEqual(['core-stands-alone'])
  })

  it.each([
    ['core', 'io', 'core-stands-alone'],
    ['io', 'state', 'io-arrows'],
    ['chart', 'panels', 'chart-arrows'],
    ['chart', 'state', 'chart-arrows'],
    ['worker', 'io', 'worker-arrows'],
    ['state', 'chart', 'state-arrows'],
  ])('refuses an import into %s from %s', async (into, from, rule) => {
    const rules = await brokenBy({
      [`src/${into}/reader.ts`]: `import '../${from}/read'\n`,
      [`src/${from}/read.ts`]: nothing,
    })
    expect(rules).toEqual([rule])
  })

  it('refuses an import of types alone just the same', async () => {
    const rules = await brokenBy({
      'src/chart/curve.tsx':
        "import type { Wanted } from '../panels/panel'\nexport type Again = Wanted\n",
      'src/panels/panel.tsx': 'export type Wanted = number\n',
    })
    expect(rules).toEqual(['chart-arrows'])
  })

  it('refuses a panel that reaches up to the start of the program', async () => {
    const rules = await brokenBy({
      'src/panels/panel.tsx': "import '../main'\n",
      'src/main.tsx': nothing,
    })
    expect(rules).toEqual(['panels-arrows'])
  })

  it('refuses a ring of files', async () => {
    const rules = await brokenBy({
      'src/core/one.ts': "import './two'\n",
      'src/core/two.ts': "import './one'\n",
    })
    expect(rules).toEqual(['no-cycles'])
  })

  it('refuses tests in what is shipped', async () => {
    const rules = await brokenBy({
      'src/main.tsx': "import '../tests/helper'\n",
      'tests/helper.ts': nothing,
    })
    expect(rules).toEqual(['no-tests-in-src'])
  })

  it('refuses a folder without a place among the arrows', async () => {
    const rules = await brokenBy({
      'src/main.tsx': "import './elsewhere/thing'\n",
      'src/elsewhere/thing.ts': nothing,
    })
    expect(rules).toEqual(['known-folders-only'])
  })

  it('refuses an import that leads nowhere', async () => {
    const rules = await brokenBy({ 'src/main.tsx': "import './missing'\n" })
    expect(rules).toEqual(['nothing-unresolved'])
  })
})

describe('the source of this program', () => {
  it('is really read, and keeps to the boundaries', async () => {
    const { modules, summary } = await check(process.cwd())
    const read = modules.map(({ source }) => source).filter((source) => source.startsWith('src/'))
    expect(read).toContain('src/core/index.ts')
    expect(modules.flatMap(({ dependencies }) => dependencies).length).toBeGreaterThan(0)
    expect(summary.violations.map(({ rule, from, to }) => `${rule.name}: ${from} → ${to}`)).toEqual(
      [],
    )
  })
})
