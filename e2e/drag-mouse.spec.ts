import { expect, frames, openBench, test } from './support/bench'
import { fragmentOf, fullDesign } from './support/designs'
import {
  carry,
  distanceTo,
  drag,
  grabbed,
  middleOf,
  mouseOf,
  placeOnLoadLine,
  showPlane,
} from './support/drag'
import {
  allSpoken,
  choose,
  handleIds,
  rangeOf,
  redoButton,
  savedDesign,
  stageField,
  undoButton,
  verdict,
} from './support/readings'

/** Each handle with a way to go that its neighbours leave free, px. */
const ways = {
  supply: { x: 0, y: 46 },
  slope: { x: 42, y: 0 },
  'knot-1': { x: 14, y: 30 },
  'knot-2': { x: -22, y: 24 },
  'knot-3': { x: -12, y: -18 },
  'knot-4': { x: 16, y: -26 },
} as const

test.beforeEach(async ({ page }) => {
  await page.setViewportSize({ width: 1440, height: 900 })
  await openBench(page)
  await showPlane(page)
})

test('everything that can be grabbed is on the plane, with a target of 24 px or more', async ({
  page,
}) => {
  expect((await handleIds(page)).sort()).toEqual(Object.keys(ways).sort())
  for (const id of Object.keys(ways)) {
    const box = (await grabbed(page, id).boundingBox())!
    expect(Math.min(box.width, box.height), id).toBeGreaterThanOrEqual(24)
  }
})

for (const [id, way] of Object.entries(ways)) {
  test(`${id} follows the mouse, and the drag is one step to undo`, async ({ page }) => {
    const before = await savedDesign(page)
    const said = await allSpoken(page)
    const mouse = mouseOf(page)
    const from = await middleOf(grabbed(page, id))
    await mouse.down(from)
    const to = await carry(page, mouse, from, way)
    const handle = await middleOf(grabbed(page, id))
    // Values are rounded to what a person would choose, so a handle may stand a pixel and a half off.
    expect(Math.abs(handle.x - to.x), 'across').toBeLessThanOrEqual(1.5)
    expect(Math.abs(handle.y - to.y), 'up').toBeLessThanOrEqual(1.5)
    expect(await allSpoken(page)).not.toEqual(said)
    await mouse.up()
    const after = await savedDesign(page)
    expect(after).not.toEqual(before)
    await undoButton(page).click()
    expect(await savedDesign(page)).toEqual(before)
    await expect(undoButton(page)).toBeDisabled()
    await redoButton(page).click()
    expect(await savedDesign(page)).toEqual(after)
    await expect(redoButton(page)).toBeDisabled()
  })
}

test('Escape during a drag puts back what was there, and leaves no step to undo', async ({
  page,
}) => {
  const before = await savedDesign(page)
  const mouse = mouseOf(page)
  for (const [id, way] of [...Object.entries(ways), ['load-line', { x: 40, y: 10 }] as const]) {
    const said = await allSpoken(page)
    const from =
      id === 'load-line' ? await placeOnLoadLine(page) : await middleOf(grabbed(page, id))
    await mouse.down(from)
    const at = await carry(page, mouse, from, way, 4)
    expect(await allSpoken(page), id).not.toEqual(said)
    await page.keyboard.press('Escape')
    await frames(page)
    expect(await allSpoken(page), id).toEqual(said)
    if (id !== 'load-line') expect(await middleOf(grabbed(page, id)), id).toEqual(from)
    // The button is still down; moving on moves nothing.
    await mouse.move({ x: at.x + 5, y: at.y + 25 })
    await mouse.up()
    await frames(page)
    expect(await allSpoken(page), id).toEqual(said)
  }
  expect(await savedDesign(page)).toEqual(before)
  await expect(undoButton(page)).toBeDisabled()
})

test('the load line itself follows the mouse wherever it is grabbed, in one step', async ({
  page,
}) => {
  const before = await savedDesign(page)
  const mouse = mouseOf(page)
  const from = await placeOnLoadLine(page)
  await mouse.down(from)
  const to = await carry(page, mouse, from, { x: -34, y: 20 })
  expect(await distanceTo(grabbed(page, 'load-line'), to)).toBeLessThanOrEqual(1.5)
  await mouse.up()
  const after = await savedDesign(page)
  expect(after.stage.seriesResistance).toBeGreaterThan(before.stage.seriesResistance)
  expect({
    ...after,
    stage: { ...after.stage, seriesResistance: before.stage.seriesResistance },
  }).toEqual(before)
  await undoButton(page).click()
  expect(await savedDesign(page)).toEqual(before)
  await expect(undoButton(page)).toBeDisabled()
})

test('after a drag the arrow keys go on from where it ended', async ({ page }) => {
  for (const id of ['supply', 'knot-1'] as const) {
    await drag(page, mouseOf(page), await middleOf(grabbed(page, id)), ways[id])
    await expect(rangeOf(page, id).first()).toBeFocused()
    const said = await allSpoken(page)
    await page.keyboard.press('ArrowUp')
    await frames(page)
    expect(await allSpoken(page)).not.toEqual(said)
  }
})

test('handles keep their distance from the pointer and do not leap under it', async ({ page }) => {
  const middle = await middleOf(grabbed(page, 'supply'))
  const mouse = mouseOf(page)
  await mouse.down({ x: middle.x + 9, y: middle.y + 8 })
  await carry(page, mouse, { x: middle.x + 9, y: middle.y + 8 }, { x: 0, y: 40 })
  expect(Math.abs((await middleOf(grabbed(page, 'supply'))).y - (middle.y + 40))).toBeLessThan(1.5)
  await mouse.up()
})

test('a press without a move changes nothing', async ({ page }) => {
  const before = await savedDesign(page)
  for (const id of ['load-line', ...Object.keys(ways)]) {
    const place =
      id === 'load-line' ? await placeOnLoadLine(page) : await middleOf(grabbed(page, id))
    await page.mouse.click(place.x, place.y)
    await frames(page)
    expect(await savedDesign(page), id).toEqual(before)
  }
  await expect(undoButton(page)).toBeDisabled()
})

test('every handle in sight follows the mouse on the linear axis too', async ({ page }) => {
  await choose(page, 'Current axis', 'Linear')
  const mouse = mouseOf(page)
  for (const [id, by] of [
    ['supply', { x: 0, y: 40 }],
    ['slope', { x: 30, y: 0 }],
    ['knot-1', { x: 0, y: 14 }],
  ] as const) {
    const from = await middleOf(grabbed(page, id))
    await mouse.down(from)
    const to = await carry(page, mouse, from, by)
    const handle = await middleOf(grabbed(page, id))
    expect(Math.hypot(handle.x - to.x, handle.y - to.y), id).toBeLessThanOrEqual(2)
    await mouse.up()
    await frames(page)
  }
})

test('with leakage, source and lead resistance every handle still follows the mouse', async ({
  page,
}) => {
  const leaky = {
    ...fullDesign,
    stage: { ...fullDesign.stage, leakageResistance: 2e7, leadResistance: 4700 },
  }
  await openBench(page, fragmentOf(leaky))
  await showPlane(page)
  const mouse = mouseOf(page)
  for (const [id, by] of [
    ['supply', { x: 0, y: 30 }],
    ['slope', { x: 26, y: 0 }],
    ['knot-2', { x: 12, y: 20 }],
    ['knot-3', { x: -16, y: 22 }],
  ] as const) {
    const from = await middleOf(grabbed(page, id))
    await mouse.down(from)
    const to = await carry(page, mouse, from, by)
    const handle = await middleOf(grabbed(page, id))
    expect(Math.abs(handle.x - to.x), `${id} across`).toBeLessThanOrEqual(2)
    // The slope's handle moves along the load line, whose upper end the leakage moves with it.
    if (id !== 'slope') expect(Math.abs(handle.y - to.y), `${id} up`).toBeLessThanOrEqual(2)
    await mouse.up()
    await frames(page)
  }
})

for (const [id, way] of Object.entries({
  supply: { x: 0, y: -90 },
  slope: { x: -300, y: 0 },
  'knot-1': { x: 0, y: -330 },
})) {
  test(`${id} can be dragged out of the plane, comes back with the mouse, and can be let go there`, async ({
    page,
  }) => {
    const before = await savedDesign(page)
    const mouse = mouseOf(page)
    const from = await middleOf(grabbed(page, id))
    await mouse.down(from)
    const far = await carry(page, mouse, from, way)
    await carry(page, mouse, far, { x: -way.x + 8, y: -way.y + 20 })
    await expect(grabbed(page, id)).toBeVisible({ timeout: 1000 })
    const handle = await middleOf(grabbed(page, id))
    if (id !== 'slope') expect(Math.abs(handle.y - from.y - 20)).toBeLessThanOrEqual(1.5)
    if (id !== 'supply') expect(Math.abs(handle.x - from.x - 8)).toBeLessThanOrEqual(1.5)
    await carry(page, mouse, { x: from.x + 8, y: from.y + 20 }, way)
    await mouse.up()
    await frames(page)
    // The drag has ended: it is a step, and the next one can begin.
    const after = await savedDesign(page)
    expect(after).not.toEqual(before)
    await undoButton(page).click()
    expect(await savedDesign(page)).toEqual(before)
    await expect(undoButton(page)).toBeDisabled()
    await drag(page, mouse, await middleOf(grabbed(page, 'slope')), { x: 20, y: 0 })
    await expect(undoButton(page)).toBeEnabled()
  })
}

test('the load line keeps to preferred resistors while it is dragged, when they are chosen', async ({
  page,
}) => {
  await choose(page, 'Step resistor and capacitor by', 'E12')
  await drag(page, mouseOf(page), await middleOf(grabbed(page, 'slope')), { x: 33, y: 0 })
  // The numbers of IEC 60063, E12.
  const e12 = [10, 12, 15, 18, 22, 27, 33, 39, 47, 56, 68, 82]
  const { seriesResistance } = (await savedDesign(page)).stage
  expect(seriesResistance).not.toBe(2.2e6)
  expect(e12).toContain(Number(seriesResistance.toExponential().split('e')[0]) * 10)
})

test('a drag cannot take a knot past its neighbours or the supply below nothing', async ({
  page,
}) => {
  const mouse = mouseOf(page)
  await drag(page, mouse, await middleOf(grabbed(page, 'knot-2')), { x: -600, y: 0 })
  const { knots } = (await savedDesign(page)).stage.lamp
  expect(knots[2]!.current).toBeGreaterThan(knots[1]!.current)
  await drag(page, mouse, await middleOf(grabbed(page, 'supply')), { x: 0, y: 700 })
  await expect(stageField(page, 'Supply')).toHaveValue(/^0\sV$/)
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'stays dark')
})
