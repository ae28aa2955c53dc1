/**
 * Runs every check and every test, shows what each says, and ends with the one line
 * `N passed, N failed`. A step that fails does not keep the others from being tried, except those
 * that need what it makes.
 */
import { spawn } from 'node:child_process'
import { mkdirSync, readFileSync, rmSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { countBrowserTests, countUnitTests, weighStep } from './count-tests.mjs'

/** @typedef {import('./count-tests.mjs').Count} Count */

const top = fileURLToPath(new URL('../..', import.meta.url))
const reports = `${top}.reports/`
const unitReport = `${reports}unit.json`
const browserReport = `${reports}browser.json`

/** No step needs nearly as long, min; one that hangs must not take the whole run with it. */
const longest = 6

/** Elsewhere than on Windows a step and all it starts can be ended as one group. */
const grouped = process.platform !== 'win32'

/** @type {import('node:child_process').ChildProcess | undefined} */
let running

function endRunning() {
  if (running?.pid === undefined) return
  if (grouped) process.kill(-running.pid, 'SIGTERM')
  else running.kill()
}

for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, () => {
    endRunning()
    process.exit(1)
  })
}

/**
 * @typedef {object} Step
 * @property {string} script The script in package.json.
 * @property {readonly string[]} [args]
 * @property {Readonly<Record<string, string>>} [environment]
 * @property {string} [needs] The step without whose success this one is not tried.
 * @property {string} [report] The report it must leave.
 * @property {(report: unknown) => Count} [count]
 */

/** @type {readonly Step[]} */
const steps = [
  { script: 'types' },
  { script: 'lint' },
  { script: 'boundaries' },
  { script: 'unused' },
  {
    script: 'unit',
    args: [
      '--allowOnly=false',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${unitReport}`,
    ],
    report: unitReport,
    count: countUnitTests,
  },
  { script: 'build' },
  { script: 'size', needs: 'build' },
  {
    script: 'browser',
    needs: 'build',
    args: ['--forbid-only', '--reporter=list,json'],
    environment: { PLAYWRIGHT_JSON_OUTPUT_NAME: browserReport },
    report: browserReport,
    count: countBrowserTests,
  },
]

/**
 * Runs a script of package.json to its end; true if it ended well.
 *
 * @param {Step} step
 * @returns {Promise<boolean>}
 */
function runScript({ script, args = [], environment = {} }) {
  const command = ['run', '--silent', script, '--', ...args]
  // npm names itself to what it starts; started by hand, it has to be on the PATH.
  const npm = process.env.npm_execpath
  /** @type {import('node:child_process').SpawnOptions} */
  const options = {
    cwd: top,
    detached: grouped,
    env: { ...process.env, ...environment },
    stdio: ['ignore', 'inherit', 'inherit'],
  }
  const child = npm
    ? spawn(process.execPath, [npm, ...command], options)
    : spawn('npm', command, { ...options, shell: !grouped })
  running = child
  return new Promise((resolve) => {
    const alarm = setTimeout(() => {
      console.log(`${script} was stopped after ${longest} min`)
      endRunning()
    }, longest * 60_000)
    /** @param {boolean} ended */
    const finish = (ended) => {
      clearTimeout(alarm)
      running = undefined
      resolve(ended)
    }
    child.on('error', (error) => {
      console.log(error.message)
      finish(false)
    })
    child.on('exit', (code) => finish(code === 0))
  })
}

/**
 * What a step's report says; null if there is none that can be read.
 *
 * @param {Step} step
 * @returns {Count | null | undefined}
 */
function readReport({ script, report, count }) {
  if (report === undefined || count === undefined) return undefined
  try {
    return count(JSON.parse(readFileSync(report, 'utf8')))
  } catch (error) {
    console.log(`No report from ${script}: ${error instanceof Error ? error.message : error}`)
    return null
  }
}

mkdirSync(reports, { recursive: true })
// A report of an earlier run must not be taken for one of this.
for (const { report } of steps) if (report !== undefined) rmSync(report, { force: true })

let passed = 0
let failed = 0
/** @type {Set<string>} */
const good = new Set()
/** @type {string[]} */
const summary = []
for (const step of steps) {
  const began = performance.now()
  console.log(`\n── ${step.script}`)
  const tried = step.needs === undefined || good.has(step.needs)
  if (!tried) console.log(`Not run: it needs ${step.needs}, which failed.`)
  const ended = tried && (await runScript(step))
  const result = weighStep(ended, readReport(step))
  passed += result.passed
  failed += result.failed
  if (result.failed === 0) good.add(step.script)
  const seconds = ((performance.now() - began) / 1000).toFixed(1)
  const tests = step.count ? `, ${result.passed} passed, ${result.failed} failed` : ''
  summary.push(
    `${result.failed === 0 ? 'good  ' : 'FAILED'}  ${step.script} (${seconds} s${tests})`,
  )
}

console.log(`\n── all\n${summary.join('\n')}`)
console.log(`${passed} passed, ${failed} failed`)
process.exitCode = failed === 0 && passed > 0 ? 0 : 1
