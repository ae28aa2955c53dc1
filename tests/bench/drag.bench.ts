import { type CDPSession, chromium, type Page } from 'playwright-core'
import { preview } from 'vite'
import { launchOptions } from '../support/find-browser.mjs'
import { quantile } from './quantile'

/** What is dragged: the handle that sets the slope of the load line. */
const handle = '[data-grab="slope"]'

/** Pointer moves of the drag, one a frame. */
const moves = 120

/** One frame at 60 a second, ms. */
const frame = 1000 / 60

/** What the page itself notes while it is dragged. */
type Notes = {
  /** From each pointer move to the end of the frame that paints what it changed, ms. */
  readonly toPaint: number[]
  /** From each pointer move to the frame after that, ms. */
  readonly toNextFrame: number[]
  /** Lengths of the tasks that the browser calls long, over 50 ms. */
  readonly longTasks: number[]
}

declare global {
  interface Window {
    dragNotes: Notes
  }
}

/** Has the page note its latencies and long tasks from now on. */
async function startNoting(page: Page): Promise<void> {
  await page.evaluate(() => {
    const notes: Notes = { toPaint: [], toNextFrame: [], longTasks: [] }
    window.dragNotes = notes
    const note = (event: PointerEvent) => {
      const since = () => performance.now() - event.timeStamp
      requestAnimationFrame(() => {
        // A message sent while a frame is made arrives when it has been painted.
        const { port1, port2 } = new MessageChannel()
        port1.onmessage = () => notes.toPaint.push(since())
        port2.postMessage(null)
        requestAnimationFrame(() => notes.toNextFrame.push(since()))
      })
    }
    window.addEventListener('pointermove', note, { capture: true, passive: true })
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) notes.longTasks.push(entry.duration)
    }).observe({ type: 'longtask' })
  })
}

/** Time the page has spent in script since it was loaded, ms. */
async function scriptTime(session: CDPSession): Promise<number> {
  const { metrics } = await session.send('Performance.getMetrics')
  const metric = metrics.find(({ name }) => name === 'ScriptDuration')
  if (metric === undefined) throw new Error('the browser does not say how long scripts ran')
  return metric.value * 1000
}

/** Waits for the next two frames, so that what was asked for before is on the screen. */
const settle = (page: Page) =>
  page.evaluate(
    () =>
      new Promise<void>((resolve) =>
        requestAnimationFrame(() => requestAnimationFrame(() => resolve())),
      ),
  )

/** Script time, ms, of each of that many steps. */
async function scriptTimes(
  session: CDPSession,
  count: number,
  step: (index: number) => Promise<unknown>,
): Promise<readonly number[]> {
  const times: number[] = []
  let before = await scriptTime(session)
  for (let index = 0; index < count; index++) {
    await step(index)
    const after = await scriptTime(session)
    times.push(after - before)
    before = after
  }
  return times
}

const mean = (values: readonly number[]) =>
  values.reduce((sum, value) => sum + value, 0) / values.length

/** Drags the load line about in the built page and reports what that costs. */
export async function run(report: (line: string) => void): Promise<void> {
  const server = await preview({ logLevel: 'warn', preview: { host: '127.0.0.1', port: 0 } })
  const browser = await chromium.launch(launchOptions())
  try {
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 } })
    await page.goto(server.resolvedUrls?.local[0] ?? '')
    const grabbed = page.locator(handle).first()
    await grabbed.scrollIntoViewIfNeeded({ timeout: 10_000 })
    const box = await grabbed.boundingBox()
    if (box === null) throw new Error(`nothing to be seen of ${handle}`)
    const x = box.x + box.width / 2
    const y = box.y + box.height / 2

    const session = await page.context().newCDPSession(page)
    await session.send('Performance.enable')
    await settle(page)
    const idle = await scriptTimes(session, 30, () => settle(page))

    await page.mouse.move(x, y)
    await page.mouse.down()
    const pictureBefore = await page.locator('body').innerHTML()
    await startNoting(page)
    // To and fro along a slanting line, ending away from the start, so that every move changes
    // something. The browser answers when it has dealt with a move, which it does once a frame.
    const began = performance.now()
    const times = await scriptTimes(session, moves, async (index) => {
      const along = Math.sin((3.5 * Math.PI * (index + 1)) / moves)
      await page.mouse.move(x + 60 * along, y + 40 * along)
    })
    const interval = (performance.now() - began) / moves
    await settle(page)
    const pictureAfter = await page.locator('body').innerHTML()
    await page.mouse.up()
    await settle(page)
    const { toPaint, toNextFrame, longTasks } = await page.evaluate(() => window.dragNotes)
    if (toPaint.length === 0) throw new Error('the page saw no pointer move')
    if (pictureAfter === pictureBefore) {
      throw new Error(`the page does not change when ${handle} is dragged`)
    }

    const ms = (value: number) => `${value.toFixed(2)} ms`
    report(`Chromium ${browser.version()}, ${moves} moves, one every ${ms(interval)}`)
    report(`moves the page saw: ${toPaint.length}`)
    report(`script a move: mean ${ms(mean(times))}, p95 ${ms(quantile(times, 0.95))}`)
    report(`script a frame at rest: mean ${ms(mean(idle) / 2)}`)
    report(
      `moves with more script than a frame of ${ms(frame)} holds: ${times.filter((time) => time > frame).length}`,
    )
    report(`from move to its paint: p95 ${ms(quantile(toPaint, 0.95))}`)
    report(`from move to the frame after its paint: p95 ${ms(quantile(toNextFrame, 0.95))}`)
    report(`tasks over 50 ms: ${longTasks.length}`)
  } finally {
    await browser.close()
    await server.close()
  }
}
