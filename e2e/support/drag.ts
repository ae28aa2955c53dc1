import type { CDPSession, Locator, Page } from '@playwright/test'
import { frames } from './bench'

/** A place in the window, px. */
export type Point = { readonly x: number; readonly y: number }

/** What can be grabbed, as drawn: a handle by its id, or the load line itself. */
export const grabbed = (page: Page, id: string): Locator => page.locator(`[data-grab="${id}"]`)

/** Middle of something drawn, px in the window. */
export async function middleOf(locator: Locator): Promise<Point> {
  const box = await locator.boundingBox()
  if (box === null) throw new Error(`nothing to be seen of ${locator}`)
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 }
}

/** Rolls the page so that the whole plane is in the window. */
export async function showPlane(page: Page): Promise<void> {
  await page.locator('[data-ground="plane"]').evaluate((plane) => {
    const { top, height } = plane.getBoundingClientRect()
    window.scrollBy({ top: top - (window.innerHeight - height) / 2, behavior: 'instant' })
  })
  await frames(page)
}

/** A place where the load line can be grabbed: on it, in sight, and under nothing else. */
export async function placeOnLoadLine(page: Page): Promise<Point> {
  const found = await grabbed(page, 'load-line').evaluate((element) => {
    const path = element as SVGPathElement
    const onScreen = path.getScreenCTM()!
    const places: Point[] = []
    for (let part = 0.02; part < 1; part += 0.01) {
      const at = path.getPointAtLength(part * path.getTotalLength()).matrixTransform(onScreen)
      if (document.elementFromPoint(at.x, at.y) === path) places.push({ x: at.x, y: at.y })
    }
    return places[Math.floor(places.length / 2)] ?? null
  })
  if (found === null) throw new Error('the load line cannot be grabbed anywhere')
  return found
}

/** Least distance from a place in the window to a drawn path, px. */
export async function distanceTo(path: Locator, place: Point): Promise<number> {
  return path.evaluate((element, { x, y }) => {
    const drawn = element as SVGPathElement
    const onScreen = drawn.getScreenCTM()!
    const length = drawn.getTotalLength()
    let least = Number.POSITIVE_INFINITY
    for (let k = 0; k <= 4000; k++) {
      const at = drawn.getPointAtLength((k / 4000) * length).matrixTransform(onScreen)
      least = Math.min(least, Math.hypot(at.x - x, at.y - y))
    }
    return least
  }, place)
}

/** What moves across the screen and can hold something: a mouse or a finger. */
export type Hand = {
  readonly down: (at: Point) => Promise<void>
  readonly move: (at: Point) => Promise<void>
  readonly up: () => Promise<void>
}

/** The mouse, its main button. */
export function mouseOf(page: Page): Hand {
  return {
    down: async ({ x, y }) => {
      await page.mouse.move(x, y)
      await page.mouse.down()
    },
    move: ({ x, y }) => page.mouse.move(x, y),
    up: () => page.mouse.up(),
  }
}

/** One finger, as real touches that the browser turns into what it likes. */
export function fingerOf(session: CDPSession): Hand & { readonly cancel: () => Promise<void> } {
  const send = async (
    type: 'touchStart' | 'touchMove' | 'touchEnd' | 'touchCancel',
    at?: Point,
  ) => {
    const touchPoints = at === undefined ? [] : [{ x: at.x, y: at.y, id: 1 }]
    await session.send('Input.dispatchTouchEvent', { type, touchPoints })
  }
  return {
    down: (at) => send('touchStart', at),
    move: (at) => send('touchMove', at),
    up: () => send('touchEnd'),
    cancel: () => send('touchCancel'),
  }
}

/** Moves a hand that holds something from place to place in small steps, a frame apart. */
export async function carry(
  page: Page,
  hand: Hand,
  from: Point,
  by: Point,
  steps = 10,
): Promise<Point> {
  let at = from
  for (let step = 1; step <= steps; step++) {
    at = { x: from.x + (by.x * step) / steps, y: from.y + (by.y * step) / steps }
    await hand.move(at)
    await frames(page)
  }
  return at
}

/** Grabs at a place, carries, and lets go. */
export async function drag(page: Page, hand: Hand, from: Point, by: Point): Promise<Point> {
  await hand.down(from)
  const at = await carry(page, hand, from, by)
  await hand.up()
  await frames(page)
  return at
}
