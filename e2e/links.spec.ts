import type { Page } from '@playwright/test'
import { deflateSync, strToU8 } from 'fflate'
import { toBase64url } from '../src/io/base64url'
import { checksum } from '../src/io/checksum'
import { longestFragment } from '../src/io/link'
import { frozenLinks } from '../tests/io/frozen-links'
import { expect, frames, openBench, standing, test } from './support/bench'
import { designWith, fragmentOf, fullDesign } from './support/designs'
import {
  designInAddress,
  everythingShown,
  openPanel,
  rangeOf,
  savedDesign,
  spoken,
  stageField,
  undoButton,
  verdict,
} from './support/readings'

/** The link that the page offers for its design. */
async function offeredLink(page: Page): Promise<string> {
  await page.getByRole('button', { name: 'Link', exact: true }).click()
  const field = page.getByRole('textbox', { name: 'Link to this design' })
  await expect(field).toHaveValue(/#/)
  const link = await field.inputValue()
  await page.keyboard.press('Escape')
  return link
}

/** Puts another link into the address of the page that is open. */
const goTo = (page: Page, fragment: string): Promise<void> =>
  page.evaluate((hash) => {
    window.location.hash = hash
  }, fragment)

/** Counts from now on how often the page writes its address. */
async function countWrites(page: Page): Promise<() => Promise<number>> {
  await page.addInitScript(() => {
    const counted = window as unknown as { writes: number }
    counted.writes = 0
    const { replaceState, pushState } = history
    history.replaceState = function (...given) {
      counted.writes += 1
      return replaceState.apply(this, given)
    }
    history.pushState = function (...given) {
      counted.writes += 1
      return pushState.apply(this, given)
    }
  })
  return () => page.evaluate(() => (window as unknown as { writes: number }).writes)
}

test('a link opens exactly that design in a browser that has never been here', async ({
  page,
  fresh,
}) => {
  await openBench(page)
  await page.getByRole('textbox', { name: 'Title of the design' }).fill('Weir gauge, north bank')
  for (const [label, typed] of [
    ['Supply', '131.7'],
    ['Source resistance', '2k35'],
    ['Series resistor', '3M3'],
    ['Capacitor', '680n'],
    ['Leakage', '2G2'],
    ['Lead resistor', '1k5'],
  ] as const) {
    await stageField(page, label).fill(typed)
    await stageField(page, label).press('Enter')
  }
  await openPanel(page, 'Lamp')
  await page.getByRole('button', { name: 'Add a knot after Origin' }).click()
  for (const [label, typed] of [
    ['Knot 2: voltage', '61.3'],
    ['Knee: voltage', '78.9'],
    ['Valley: current', '77u'],
    ['Knot 6: current', '8.3m'],
    ['Recovery time', '240u'],
    ['Strike delay', '3.1m'],
  ] as const) {
    const field = page.getByRole('textbox', { name: label, exact: true })
    await field.fill(typed)
    await field.press('Enter')
  }
  await page.getByRole('textbox', { name: 'Lamp', exact: true }).fill('No. 3 of the bag')
  const sent = await savedDesign(page)
  expect(sent.stage.lamp.knots).toHaveLength(6)
  const shown = await everythingShown(page)
  expect(Object.keys(shown).length).toBeGreaterThan(30)
  const link = await offeredLink(page)
  expect(link.length).toBeLessThan(2000)

  const other = await fresh({ viewport: { width: 1280, height: 720 } })
  await other.goto(link)
  await standing(other)
  expect(await savedDesign(other)).toEqual(sent)
  expect(await everythingShown(other)).toEqual(shown)
  expect(await offeredLink(other)).toBe(link)
})

test('a link to a design with everything in it opens with every number as it was', async ({
  page,
}) => {
  await openBench(page, fragmentOf(fullDesign))
  expect(await savedDesign(page)).toEqual(fullDesign)
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'flashes')
  expect(await page.getByRole('alert').count()).toBe(0)
})

for (const [index, { version, fragment, design }] of frozenLinks.entries()) {
  test(`a link of format ${version} sent out long ago still opens (${index + 1})`, async ({
    page,
  }) => {
    await openBench(page, fragment)
    expect(await savedDesign(page)).toEqual(design)
    await expect(page.getByRole('textbox', { name: 'Title of the design' })).toHaveValue(
      design.title,
    )
  })
}

test('the address follows when a change is done, and not at every move of a drag', async ({
  page,
}) => {
  const writes = await countWrites(page)
  await openBench(page)
  const box = (await page.locator('[data-grab="supply"]').boundingBox())!
  const at = { x: box.x + box.width / 2, y: box.y + box.height / 2 }
  await page.mouse.move(at.x, at.y)
  await page.mouse.down()
  for (let step = 1; step <= 60; step++) {
    await page.mouse.move(at.x, at.y + 20 + 20 * Math.sin(step / 5))
    await frames(page)
  }
  const design = await rangeOf(page, 'supply').inputValue()
  expect(await writes()).toBeLessThanOrEqual(3)
  const during = await writes()
  await page.mouse.up()
  await expect
    .poll(() => Math.round((designInAddress(page)?.stage.supplyVoltage ?? 0) * 10))
    .toBe(Number(design))
  expect((await writes()) - during).toBeLessThanOrEqual(2)
})

test('a key held down does not write the address more often than browsers allow', async ({
  page,
}) => {
  const writes = await countWrites(page)
  await openBench(page)
  await rangeOf(page, 'supply').focus()
  const start = Date.now()
  for (let k = 0; k < 60; k++) await page.keyboard.press(k % 2 === 0 ? 'ArrowUp' : 'PageUp')
  // Browsers refuse more than 100 in 30 s.
  expect(await writes()).toBeLessThanOrEqual(2 + ((Date.now() - start) / 30_000) * 100)
  await expect.poll(() => designInAddress(page)?.stage.supplyVoltage).toBe(450)
})

test('a link pasted into the same tab opens, and Undo goes back', async ({ page }) => {
  await openBench(page, fragmentOf(designWith({ supplyVoltage: 110 }, 'First')))
  const first = await savedDesign(page)
  await goTo(page, fragmentOf(fullDesign))
  await expect(page.getByRole('textbox', { name: 'Title of the design' })).toHaveValue(
    fullDesign.title,
  )
  expect(await savedDesign(page)).toEqual(fullDesign)
  await undoButton(page).click()
  expect(await savedDesign(page)).toEqual(first)
})

test('a link survives what mail programs do to it', async ({ page }) => {
  const fragment = fragmentOf(designWith({ supplyVoltage: 111 }))
  await openBench(page, `${fragment.replaceAll('.', '%2E')}.`)
  expect(await spoken(rangeOf(page, 'supply'))).toBe('111 volts')
  expect(await page.getByRole('alert').count()).toBe(0)
})

/** A link with a right checksum around any text. */
function sealed(text: string, format = 1): string {
  const data = deflateSync(strToU8(text), { level: 9 })
  const head = strToU8(`${format}.`)
  const all = new Uint8Array(head.length + data.length)
  all.set(head)
  all.set(data, head.length)
  return `#${format}.${checksum(all).toString(16).padStart(8, '0')}.${toBase64url(data)}`
}

const good = fragmentOf(fullDesign)
const numbers = '[120,0,1e6,1e-6,null,0,0,0]'

const damagedLinks: readonly (readonly [what: string, fragment: string, why: RegExp])[] = [
  ['cut short by half', good.slice(0, good.length / 2), /damaged.*missing or changed/],
  ['cut short by one character', good.slice(0, -1), /damaged/],
  [
    'with one character changed',
    `${good.slice(0, 60)}${good[60] === 'A' ? 'B' : 'A'}${good.slice(61)}`,
    /damaged/,
  ],
  [
    'with its checksum changed',
    good.replace(/\.(.)/, (_, one) => `.${one === '0' ? '1' : '0'}`),
    /damaged/,
  ],
  ['that is no base64', good.replace(/.{6}$/, '!*()$;'), /damaged/],
  ['with nothing in it', '#1..', /damaged/],
  ['made by a newer version', sealed('{}', 3), /newer Glowloop: format 3/],
  ['too long', `${good}${'A'.repeat(longestFragment)}`, /too long/],
  ['that unpacks to megabytes', sealed(`"${'x'.repeat(1_000_000)}"`), /unpacks to far more/],
  ['that is plain text', '#the-quick-brown-fox', /not a design/],
  ['that is a script', '#<img src=x onerror=alert(1)>', /not a design/],
  ['to something else', sealed('{"__proto__":{"stage":1},"constructor":7}'), /not a design/],
  ['to lists of lists', sealed('['.repeat(900) + ']'.repeat(900)), /not a design/],
  [
    'with a negative resistor',
    sealed(`["","","",${numbers.replace('1e6', '-5')},[1e-6,70,1e-3,90]]`),
    /series resistor must be/,
  ],
  [
    'with a number beyond all numbers',
    sealed(`["","","",${numbers.replace('120', '1e999')},[1e-6,70]]`),
    /supply voltage must be|not a design/,
  ],
  [
    'with currents that go back',
    sealed(`["","","",${numbers},[1e-3,70,1e-6,90]]`),
    /current|knot/i,
  ],
  [
    'with a title of a book’s length',
    sealed(`["${'T'.repeat(500)}","","",${numbers},[1e-6,70,1e-3,90]]`),
    /title may be at most/,
  ],
  [
    'with a thousand knots',
    sealed(`["","","",${numbers},[${Array.from({ length: 2000 }, (_, k) => k + 1).join(',')}]]`),
    /knots|not a design|too long/,
  ],
]

test.describe('a link that cannot be opened says why, keeps its text for copying, and leaves the design alone', () => {
  const mine = designWith({ supplyVoltage: 117 }, 'My own')

  test('on a visit with a design kept from the one before', async ({ page }) => {
    await openBench(page, fragmentOf(mine))
    const sentence = (await verdict(page).textContent())!
    await expect.poll(() => page.evaluate(() => localStorage.length)).toBeGreaterThan(0)
    for (const [what, fragment, why] of damagedLinks) {
      await openBench(page, fragment)
      await damageIsReported(page, fragment, why)
      await expect(verdict(page), what).toHaveText(sentence)
    }
    expect(await savedDesign(page)).toEqual(mine)
    // The page works on, and closing the note leaves no trace.
    await rangeOf(page, 'supply').press('ArrowUp')
    expect(await spoken(rangeOf(page, 'supply'))).toBe('118 volts')
    await expect(page.getByRole('alert')).toBeVisible()
    await page.getByRole('alert').getByRole('button', { name: 'Close' }).click()
    await expect(page.getByRole('alert')).toHaveCount(0)
    await expect.poll(() => designInAddress(page)?.stage.supplyVoltage).toBe(118)
  })

  test('in the same tab', async ({ page }) => {
    await openBench(page, fragmentOf(mine))
    for (const [, fragment, why] of damagedLinks) {
      await goTo(page, fragment)
      await damageIsReported(page, fragment, why)
    }
    expect(await savedDesign(page)).toEqual(mine)
    // A good one after all that opens, and the note is gone.
    await goTo(page, good)
    await expect(page.getByRole('alert')).toHaveCount(0)
    expect(await savedDesign(page)).toEqual(fullDesign)
    await undoButton(page).click()
    expect(await savedDesign(page)).toEqual(mine)
  })

  test('whichever character is changed', async ({ page }) => {
    await openBench(page, fragmentOf(mine))
    for (let at = 1; at < good.length; at += 7) {
      const other = good[at] === '7' ? '8' : '7'
      const changed = `${good.slice(0, at)}${other}${good.slice(at + 1)}`
      await goTo(page, changed)
      await expect(page.getByRole('alert').getByRole('textbox'), changed).toHaveValue(changed)
    }
    expect(await savedDesign(page)).toEqual(mine)
  })

  async function damageIsReported(page: Page, fragment: string, why: RegExp): Promise<void> {
    const note = page.getByRole('alert')
    const text = note.getByRole('textbox', { name: 'for copying' })
    await expect(text).toHaveValue(new URL(fragment, 'http://127.0.0.1/').hash)
    await expect(text).toHaveAttribute('readonly')
    await expect(note).toContainText(why)
    await expect(note).toContainText('nothing of it changed')
    expect(await note.textContent()).not.toMatch(/undefined|NaN|\[object/)
  }
})

test('a damaged link on a first visit shows the page all the same', async ({ page }) => {
  await openBench(page, good.slice(0, 50))
  await expect(page.getByRole('alert')).toContainText('damaged')
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'flashes')
  expect((await savedDesign(page)).title).toBe('Mooring beacon')
})
