import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import { distanceTo, grabbed, middleOf, showPlane } from './support/drag'
import {
  allSpoken,
  choose,
  handleIds,
  rangeOf,
  redoButton,
  savedDesign,
  spoken,
  stageField,
  undoButton,
} from './support/readings'

test.beforeEach(async ({ page }) => {
  await page.setViewportSize({ width: 1440, height: 900 })
  await openBench(page)
})

test('every handle has a name and says its value in words', async ({ page }) => {
  const names = await page
    .locator('input[data-handle]')
    .evaluateAll((inputs) => inputs.map((input) => input.getAttribute('aria-label') ?? ''))
  expect(new Set(names).size).toBe(names.length)
  for (const [name, said] of [
    [/^Supply end of the load line/, '120 volts'],
    [/^Slope of the load line/, '2.2 megohms'],
    [/^Knee: voltage/, '75 volts'],
    [/^Knee: current/, '200 nanoamps'],
    [/^Valley: voltage/, '55 volts'],
    [/^Valley: current/, '90 microamps'],
    [/^Knot 4: voltage/, '60 volts'],
    [/^Knot 5: current/, '8 milliamps'],
  ] as const) {
    await expect(page.getByRole('slider', { name })).toHaveAttribute('aria-valuetext', said)
  }
})

test('Tab goes through all handles, and the one it is on can be seen', async ({ page }) => {
  await showPlane(page)
  const ids = await handleIds(page)
  const plain = new Map<string, Buffer>()
  for (const id of ids) plain.set(id, await grabbed(page, id).screenshot())
  await rangeOf(page, 'supply').focus()
  const met: string[] = []
  for (let k = 0; k < 30; k++) {
    const id = await page.evaluate(() => document.activeElement?.getAttribute('data-handle'))
    if (id == null) break
    if (!met.includes(id)) {
      met.push(id)
      expect((await grabbed(page, id).screenshot()).equals(plain.get(id)!), id).toBe(false)
    }
    await page.keyboard.press('Tab')
  }
  expect(met.sort()).toEqual(ids.sort())
})

test('every handle is stepped by arrow keys, finely and coarsely, and back', async ({ page }) => {
  for (const [id, along, fine, coarse] of [
    ['supply', 'voltage', ['121 volts', '120 volts'], ['130 volts', '120 volts']],
    // One per cent and ten.
    ['slope', 'current', ['2.22 megohms', '2.2 megohms'], ['2.42 megohms', '2.2 megohms']],
    ['knot-1', 'voltage', ['75.5 volts', '75 volts'], ['80 volts', '75 volts']],
    ['knot-1', 'current', ['204 nanoamps', '200 nanoamps'], ['250 nanoamps', '200 nanoamps']],
    ['knot-2', 'voltage', ['55.5 volts', '55 volts'], ['60 volts', '55 volts']],
    ['knot-3', 'voltage', ['60.5 volts', '60 volts'], ['65 volts', '60 volts']],
    ['knot-4', 'current', ['8.16 milliamps', '8 milliamps'], ['10 milliamps', '8 milliamps']],
  ] as const) {
    const range = rangeOf(page, id, along)
    const [up, down] =
      along === 'voltage' ? ['ArrowUp', 'ArrowDown'] : (['ArrowRight', 'ArrowLeft'] as const)
    await range.focus()
    for (const [keys, values] of [
      [[up, down], fine],
      [[`Shift+${up}`, `Shift+${down}`], coarse],
      [['PageUp', 'PageDown'], coarse],
    ] as const) {
      await range.press(keys[0]!)
      expect(await spoken(range), `${id} ${keys[0]}`).toBe(values[0])
      await range.press(keys[1]!)
      expect(await spoken(range), `${id} ${keys[1]}`).toBe(values[1])
    }
  }
  // The circuit followed all of it, and ends where it began.
  expect((await savedDesign(page)).stage.supplyVoltage).toBe(120)
})

test('one range of a knot takes both pairs of arrow keys', async ({ page }) => {
  const range = rangeOf(page, 'knot-1', 'voltage')
  await range.press('ArrowRight')
  expect(await spoken(rangeOf(page, 'knot-1', 'current'))).toBe('204 nanoamps')
  await range.press('ArrowUp')
  expect(await spoken(range)).toBe('75.5 volts')
})

test('the slope steps through preferred values, and by decades', async ({ page }) => {
  const range = rangeOf(page, 'slope')
  // IEC 60063, after 2.2: 3.3 in E6, 2.7 in E12, 2.4 in E24.
  for (const [series, next] of [
    ['E6', '3.3 megohms'],
    ['E12', '2.7 megohms'],
    ['E24', '2.4 megohms'],
  ] as const) {
    await choose(page, 'Step resistor and capacitor by', series)
    await range.press('ArrowUp')
    expect(await spoken(range)).toBe(next)
    await range.press('ArrowDown')
    expect(await spoken(range)).toBe('2.2 megohms')
    await range.press('Shift+ArrowUp')
    expect(await spoken(range)).toBe('22 megohms')
    await range.press('Shift+ArrowDown')
    expect(await spoken(range)).toBe('2.2 megohms')
  }
})

test('a range set by a screen reader sets the stage', async ({ page }) => {
  for (const [id, along, value, said] of [
    ['supply', 'voltage', '1105', '111 volts'],
    ['slope', 'current', '6000', '1 megohm'],
    ['knot-1', 'voltage', '701', '70.1 volts'],
    ['knot-1', 'current', '-7000', '100 nanoamps'],
  ] as const) {
    await rangeOf(page, id, along).fill(value)
    expect(await spoken(rangeOf(page, id, along))).toBe(said)
  }
  const { stage } = await savedDesign(page)
  expect(stage.supplyVoltage).toBe(110.5)
  expect(stage.seriesResistance).toBe(1e6)
  expect(stage.lamp.knots[1]).toEqual({ voltage: 70.1, current: 1e-7 })
})

test('steps end at what there can be, and nothing breaks there', async ({ page }) => {
  await rangeOf(page, 'supply').focus()
  for (let k = 0; k < 14; k++) await page.keyboard.press('PageDown')
  expect(await spoken(rangeOf(page, 'supply'))).toBe('0 volts')
  await page.keyboard.press('ArrowDown')
  expect(await spoken(rangeOf(page, 'supply'))).toBe('0 volts')
  await rangeOf(page, 'knot-1', 'current').focus()
  for (let k = 0; k < 40; k++) await page.keyboard.press('PageUp')
  const { knots } = (await savedDesign(page)).stage.lamp
  expect(knots[1]!.current).toBeLessThan(knots[2]!.current)
})

test('Ctrl+Z and Ctrl+Y work while a handle has the keyboard', async ({ page }) => {
  const range = rangeOf(page, 'supply')
  await range.press('ArrowUp')
  await range.press('ArrowUp')
  expect(await spoken(range)).toBe('122 volts')
  await page.keyboard.press('Control+z')
  expect(await spoken(range)).toBe('121 volts')
  await page.keyboard.press('Control+z')
  expect(await spoken(range)).toBe('120 volts')
  await expect(undoButton(page)).toBeDisabled()
  await page.keyboard.press('Control+y')
  expect(await spoken(range)).toBe('121 volts')
  await page.keyboard.press('Control+Shift+z')
  expect(await spoken(range)).toBe('122 volts')
  await expect(redoButton(page)).toBeDisabled()
})

const selectedField = (page: Page, label: string) =>
  page
    .getByRole('region', { name: 'Plane and trace' })
    .getByRole('textbox', { name: label, exact: true })

test('the handle chosen last has its values to type beside the plane', async ({ page }) => {
  await rangeOf(page, 'supply').focus()
  await selectedField(page, 'Supply').fill('105 V')
  await selectedField(page, 'Supply').press('Enter')
  await expect(stageField(page, 'Supply')).toHaveValue(/^105\sV$/)
  await rangeOf(page, 'slope').focus()
  await selectedField(page, 'Series resistor').fill('1M8')
  await selectedField(page, 'Series resistor').press('Enter')
  await expect(stageField(page, 'Series resistor')).toHaveValue(/^1\.8\sMΩ$/)
  await rangeOf(page, 'knot-2', 'voltage').focus()
  await selectedField(page, 'Voltage').fill('52,5')
  await selectedField(page, 'Voltage').press('Enter')
  await selectedField(page, 'Current').fill('120u')
  await selectedField(page, 'Current').press('Enter')
  expect((await savedDesign(page)).stage.lamp.knots[2]).toEqual({ voltage: 52.5, current: 1.2e-4 })
})

for (const [what, ways] of [
  ['the load line', { supply: { x: 120, y: -50 }, slope: { x: 44, y: 60 } }],
  [
    'each knot',
    {
      'knot-1': { x: 36, y: 40 },
      'knot-2': { x: -50, y: 44 },
      'knot-3': { x: -8, y: -40 },
      'knot-4': { x: 22, y: -40 },
    },
  ],
] as const) {
  test(`${what} is placed with a click and no drag`, async ({ page }) => {
    // A zoom chosen by hand keeps the axes where they are.
    await page.getByRole('button', { name: 'Zoom the plane out' }).click()
    const before = await savedDesign(page)
    for (const [id, by] of Object.entries(ways)) {
      await rangeOf(page, id).first().focus()
      await page.getByRole('button', { name: 'Place with a click' }).click()
      await expect(page.getByRole('button', { name: 'Now click on the plane' })).toBeVisible()
      await showPlane(page)
      const now = await middleOf(grabbed(page, id))
      const at = { x: now.x + by.x, y: now.y + by.y }
      const under = await page.evaluate(
        ({ x, y }) => document.elementFromPoint(x, y)?.getAttribute('data-ground'),
        at,
      )
      expect(under, id).toBe('plane')
      await page.mouse.click(at.x, at.y)
      await frames(page)
      if (id === 'slope') {
        expect(await distanceTo(grabbed(page, 'load-line'), at), id).toBeLessThanOrEqual(2)
      } else {
        const handle = await middleOf(grabbed(page, id))
        expect(Math.abs(handle.y - at.y), id).toBeLessThanOrEqual(2)
        if (id !== 'supply') expect(Math.abs(handle.x - at.x), id).toBeLessThanOrEqual(2)
      }
      // One click places once, and one step takes it back.
      await expect(page.getByRole('button', { name: 'Place with a click' })).toBeVisible()
      const said = await allSpoken(page)
      await page.mouse.click(at.x + 60, at.y)
      expect(await allSpoken(page), id).toEqual(said)
      await undoButton(page).click()
    }
    expect(await savedDesign(page)).toEqual(before)
    await expect(undoButton(page)).toBeDisabled()
  })
}
