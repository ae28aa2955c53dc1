/**
 * Prints the figures of speed and size in one run: how long the core takes over a stage, what a
 * drag costs in a browser, and how much JavaScript the page loads at its start.
 */
import { readdirSync, readFileSync } from 'node:fs'
import { cpus } from 'node:os'
import { fileURLToPath, pathToFileURL } from 'node:url'
import { gzipSync } from 'node:zlib'
import { build } from 'vite'

const top = fileURLToPath(new URL('../..', import.meta.url))
const built = `${top}.reports/bench/`

/** @param {string} name */
const source = (name) => fileURLToPath(new URL(`${name}.bench.ts`, import.meta.url))

/** @param {string} line */
const report = (line) => console.log(`  ${line}`)

console.log(`Node ${process.version}, ${cpus().length} cores, ${cpus()[0]?.model ?? 'unknown'}`)

// The benches and the core they measure are bundled as they would be shipped, then run by Node.
await build({
  root: top,
  configFile: false,
  logLevel: 'warn',
  build: {
    ssr: true,
    outDir: built,
    emptyOutDir: true,
    target: 'node20',
    rolldownOptions: {
      input: { core: source('core'), fit: source('fit'), drag: source('drag') },
      output: { entryFileNames: '[name].mjs' },
    },
  },
})
await build({ root: top, logLevel: 'warn' })

/** @param {string} name */
const bench = (name) => import(pathToFileURL(`${built}${name}.mjs`).href)

console.log('\nThe core')
await (await bench('core')).run(report)

console.log('\nA fit to a sweep')
await (await bench('fit')).run(report)

console.log('\nA drag of the load line')
await (await bench('drag')).run(report)

console.log('\nJavaScript loaded at the start')
const assets = `${top}dist/assets/`
const start = readdirSync(assets).filter((name) => /^start-.*\.js$/.test(name))
// As hard as the size check squeezes, so that both say the same.
const packed = start.map((name) => gzipSync(readFileSync(assets + name), { level: 9 }).length)
const bytes = packed.reduce((sum, size) => sum + size, 0)
report(
  `${(bytes / 1000).toFixed(1)} kB gzip, in ${start.length} file${start.length === 1 ? '' : 's'}`,
)
