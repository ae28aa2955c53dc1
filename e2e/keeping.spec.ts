import { readFile } from 'node:fs/promises'
import type { Page } from '@playwright/test'
import { writeDesignFile } from '../src/io/designFile'
import { expect, openBench, standing, test } from './support/bench'
import { designWith, fragmentOf, fullDesign } from './support/designs'
import {
  choose,
  designInAddress,
  openPanel,
  rangeOf,
  redoButton,
  savedDesign,
  spoken,
  stageField,
  undoButton,
  verdict,
} from './support/readings'

/** What the page says of its own accord, where it says anything. */
const notice = (page: Page) =>
  page.getByRole('status').filter({ has: page.getByRole('button', { name: 'Close' }) })

test('a design is there again on the next visit, with no link', async ({ page }) => {
  await openBench(page)
  await stageField(page, 'Supply').fill('104')
  await stageField(page, 'Supply').press('Enter')
  await openPanel(page, 'Lamp')
  await page.getByRole('button', { name: 'Add a knot after Valley' }).click()
  await page.getByRole('textbox', { name: 'Title of the design' }).fill('Kept overnight')
  await page.keyboard.press('Tab')
  const mine = await savedDesign(page)
  await expect.poll(() => designInAddress(page)?.title).toBe('Kept overnight')
  await openBench(page)
  expect(await savedDesign(page)).toEqual(mine)
  await expect(undoButton(page)).toBeDisabled()
})

test('a change made just before the page is left is kept too', async ({ page }) => {
  await openBench(page)
  // By now the part that keeps designs has been loaded.
  await savedDesign(page)
  await rangeOf(page, 'supply').press('ArrowUp')
  await openBench(page)
  expect(await spoken(rangeOf(page, 'supply'))).toBe('121 volts')
})

test('a link wins over what was kept, which stays one Undo away', async ({ page }) => {
  await openBench(page)
  await stageField(page, 'Supply').fill('104')
  await stageField(page, 'Supply').press('Enter')
  const mine = await savedDesign(page)
  await expect.poll(() => designInAddress(page)?.stage.supplyVoltage).toBe(104)
  await openBench(page, fragmentOf(fullDesign))
  expect(await savedDesign(page)).toEqual(fullDesign)
  await undoButton(page).click()
  expect(await savedDesign(page)).toEqual(mine)
})

test('a saved file opens exactly that design in a browser that has never been here', async ({
  page,
  fresh,
}) => {
  await openBench(page, fragmentOf(fullDesign))
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Save', exact: true }).click(),
  ])
  expect(download.suggestedFilename()).toBe('weir-gauge-north-bank.glowloop.json')
  const buffer = await readFile(await download.path())
  const other = await fresh()
  await openBench(other)
  await openFile(other, buffer)
  await expect(verdict(other)).toHaveText((await verdict(page).textContent())!)
  expect(await savedDesign(other)).toEqual(fullDesign)
  await expect(undoButton(other)).toBeEnabled()
})

async function openFile(page: Page, content: Buffer | string): Promise<void> {
  const buffer = typeof content === 'string' ? Buffer.from(content) : content
  await page
    .getByLabel('Open a saved design')
    .setInputFiles({ name: 'design.glowloop.json', mimeType: 'application/json', buffer })
}

test('the Open button asks for a file', async ({ page }) => {
  await openBench(page)
  const [chooser] = await Promise.all([
    page.waitForEvent('filechooser'),
    page.getByRole('button', { name: 'Open', exact: true }).click(),
  ])
  const written = writeDesignFile(fullDesign)
  await chooser.setFiles({
    name: 'x.json',
    mimeType: 'application/json',
    buffer: Buffer.from(written.ok ? written.text : ''),
  })
  await expect(page.getByRole('textbox', { name: 'Title of the design' })).toHaveValue(
    fullDesign.title,
  )
})

test('a file that cannot be opened says why, keeps its text for copying, and changes nothing', async ({
  page,
}) => {
  await openBench(page, fragmentOf(designWith({ supplyVoltage: 117 }, 'My own')))
  const mine = await savedDesign(page)
  const written = writeDesignFile(fullDesign)
  if (!written.ok) throw new Error(written.message)
  const { text } = written
  for (const [content, why] of [
    ['', /empty/],
    [text.slice(0, 300), /damaged, cut short or of another kind/],
    ['{"program":"Other","x":1}', /not a design saved by Glowloop/],
    ['null', /not a design saved by Glowloop/],
    [text.replace('"format": 1', '"format": 7'), /newer Glowloop: format 7/],
    [text.replace('131.7', '-131.7'), /supply voltage must be/],
    [text.replace('131.7', '"131.7"'), /supply voltage must be.*not a number/],
    [text.replace(/"knots": \[[^\]]*\]/, '"knots": []'), /knot/],
    [text.replace('"title"', '"__proto__"'), /title must be text/],
    ['\u0000\u0001\u0002 PK\u0003\u0004', /damaged, cut short or of another kind/],
    [`"${'x'.repeat(2_200_000)}"`, /far larger/],
    [Buffer.alloc(4_100_000, 120), /far larger/],
  ] as const) {
    await openFile(page, content)
    const note = page.getByRole('alert')
    await expect(note).toContainText(why)
    await expect(note).toContainText('nothing of it changed')
    if (typeof content === 'string' && content !== '') {
      const kept = await note.getByRole('textbox', { name: 'for copying' }).inputValue()
      expect(kept.slice(0, 200)).toBe(content.slice(0, 200))
    }
    await note.getByRole('button', { name: 'Close' }).click()
  }
  expect(await savedDesign(page)).toEqual(mine)
  // The page works on, and the same file once mended opens.
  await openFile(page, text)
  await expect(page.getByRole('textbox', { name: 'Title of the design' })).toHaveValue(
    fullDesign.title,
  )
})

test('a file with something unknown in it opens, and says what was left out', async ({ page }) => {
  await openBench(page)
  const written = writeDesignFile(fullDesign)
  if (!written.ok) throw new Error(written.message)
  await openFile(page, written.text.replace('"title"', '"weather": "rain",\n"title"'))
  await expect(notice(page)).toContainText('“weather”')
  expect(await savedDesign(page)).toEqual(fullDesign)
})

for (const [what, blocked] of [
  [
    'is blocked',
    () =>
      Object.defineProperty(window, 'localStorage', {
        get() {
          throw new DOMException('Access is denied for this document.', 'SecurityError')
        },
      }),
  ],
  [
    'is full',
    () => {
      Storage.prototype.setItem = () => {
        throw new DOMException('The quota has been exceeded.', 'QuotaExceededError')
      }
    },
  ],
] as const) {
  test(`where the browser’s storage ${what}, the page works and says so`, async ({ page }) => {
    await page.addInitScript(blocked)
    await openBench(page)
    await expect(verdict(page)).toHaveAttribute('data-verdict', 'flashes')
    await stageField(page, 'Supply').fill('104')
    await stageField(page, 'Supply').press('Enter')
    await expect(notice(page)).toContainText(/browser d(?:id|oes) not/)
    await expect.poll(() => designInAddress(page)?.stage.supplyVoltage).toBe(104)
    await page.getByLabel('Light or dark page').selectOption('dark')
    expect((await savedDesign(page)).stage.supplyVoltage).toBe(104)
    await notice(page).getByRole('button', { name: 'Close' }).click()
    await expect(notice(page)).toHaveCount(0)
    // Said once is enough.
    await rangeOf(page, 'supply').press('ArrowUp')
    await expect.poll(() => designInAddress(page)?.stage.supplyVoltage).toBe(105)
    await expect(notice(page)).toHaveCount(0)
  })
}

test('what the browser kept damaged is said, and the page starts as on a first visit', async ({
  page,
}) => {
  await page.addInitScript(() => localStorage.setItem('glowloop.design', '{"program":"Glowl'))
  await openBench(page)
  await expect(notice(page)).toContainText('could not be opened')
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'flashes')
})

test('the three worked examples open: one flashes, one stays lit, one stays dark; one’s own design is one Undo away', async ({
  page,
}) => {
  await openBench(page, fragmentOf(fullDesign))
  for (const [name, code] of [
    ['Mooring beacon', 'flashes'],
    ['Workshop panel lamp', 'stays lit'],
    ['Gate blinker, dark since March', 'stays dark'],
  ] as const) {
    await page.getByRole('button', { name: 'Examples', exact: true }).click()
    await page.locator('#examples').getByRole('button', { name }).click()
    await expect(page.locator('#examples')).toBeHidden()
    await expect(verdict(page)).toHaveAttribute('data-verdict', code)
    await expect(verdict(page)).toContainText(/\d/)
    await expect(page.getByRole('textbox', { name: 'Title of the design' })).toHaveValue(name)
    await undoButton(page).click()
    expect(await savedDesign(page)).toEqual(fullDesign)
  }
})

test('undo and redo go through all kinds of changes, by button and by key', async ({ page }) => {
  await openBench(page)
  const states = [await savedDesign(page)]
  const changes = [
    async () => rangeOf(page, 'supply').press('PageUp'),
    async () => {
      await stageField(page, 'Capacitor').fill('1u')
      await stageField(page, 'Capacitor').press('Enter')
    },
    async () => {
      await choose(page, 'Step resistor and capacitor by', 'E6')
      await page
        .getByRole('region', { name: 'The stage' })
        .getByRole('button', { name: 'Series resistor: step up' })
        .click()
    },
    async () => {
      await openPanel(page, 'Lamp')
      await page.getByRole('button', { name: 'Remove Knot 4' }).click()
    },
    async () => {
      await page.getByRole('textbox', { name: 'Title of the design' }).fill('New name')
      await page.keyboard.press('Tab')
    },
    async () => {
      await page.getByRole('button', { name: 'Examples', exact: true }).click()
      await page.getByRole('button', { name: /Workshop panel lamp/ }).click()
    },
  ]
  for (const change of changes) {
    await change()
    states.push(await savedDesign(page))
  }
  for (let k = states.length - 2; k >= 0; k--) {
    if (k % 2 === 0) await undoButton(page).click()
    else await page.keyboard.press('Control+z')
    expect(await savedDesign(page), `state ${k}`).toEqual(states[k])
  }
  await expect(undoButton(page)).toBeDisabled()
  for (let k = 1; k < states.length; k++) {
    if (k % 2 === 0) await redoButton(page).click()
    else await page.keyboard.press(k % 3 === 0 ? 'Control+Shift+z' : 'Control+y')
    expect(await savedDesign(page), `state ${k}`).toEqual(states[k])
  }
  await expect(redoButton(page)).toBeDisabled()
  // The address and what is kept follow an undo as they follow a change.
  await undoButton(page).click()
  await expect.poll(() => designInAddress(page)).toEqual(states.at(-2))
})

test('a change after an undo leaves nothing to redo', async ({ page }) => {
  await openBench(page)
  await rangeOf(page, 'supply').press('ArrowUp')
  await undoButton(page).click()
  await expect(redoButton(page)).toBeEnabled()
  await rangeOf(page, 'supply').press('ArrowDown')
  await expect(redoButton(page)).toBeDisabled()
})

test('the link in the menu is copied, or selected where the browser forbids copying', async ({
  page,
  context,
}) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write'])
  await openBench(page)
  await standing(page)
  await page.getByRole('button', { name: 'Link', exact: true }).click()
  const field = page.getByRole('textbox', { name: 'Link to this design' })
  await expect(field).toHaveValue(/#1\./)
  await page.getByRole('button', { name: 'Copy the link' }).click()
  await expect(page.getByRole('button', { name: 'Copied' })).toBeVisible()
  expect(await page.evaluate(() => navigator.clipboard.readText())).toBe(await field.inputValue())
})
