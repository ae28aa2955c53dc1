import type { Page } from '@playwright/test'
import { expect, openBench, test } from './support/bench'
import { openPanel, verdict } from './support/readings'

/** Opens one part of the lamp's panel. */
async function openPart(page: Page, name: string): Promise<void> {
  await openPanel(page, 'Lamp')
  await page.getByRole('radio', { name, exact: true }).check({ force: true })
}

/** A sweep through 100 kΩ of a lamp made up for this test: knee 74 V, valley 56 V at 100 µA, 30 kΩ above. */
function madeUpSweep(): string {
  const rows: string[] = []
  const lit = (supply: number) => 56 + ((supply - 56 - 10) / 130e3) * 30e3
  // Last digits of a meter, not random, so that the test is the same every time.
  const wobble = (k: number) => ((k * 7919) % 13) / 100 - 0.06
  let k = 0
  for (let supply = 10; supply < 74; supply += 4)
    rows.push(`${supply};${(supply - 0.01 + wobble(k++)).toFixed(2)}`)
  for (let supply = 76; supply <= 260; supply += 4)
    rows.push(`${supply};${(lit(supply) + wobble(k++)).toFixed(2)}`)
  for (let supply = 256; supply >= 68; supply -= 4)
    rows.push(`${supply};${(lit(supply) + wobble(k++)).toFixed(2)}`)
  for (let supply = 64; supply >= 12; supply -= 4)
    rows.push(`${supply};${(supply - 0.01 + wobble(k++)).toFixed(2)}`)
  return `Supply (V);Lamp (V)\n${rows.join('\n').replaceAll('.', ',')}\n`
}

test('a sweep is pasted, fitted, put into the design, kept as a lamp, and sent as a link', async ({
  page,
  fresh,
}) => {
  await openBench(page)
  await openPart(page, 'From a sweep')
  const readings = page.getByRole('region', { name: 'The readings' })
  await readings.getByLabel('Meter’s resistance').fill('none')
  await readings.getByLabel('Readings of the sweep, a row each').fill(`${madeUpSweep()}abc;12\n`)
  const understood = page.getByRole('region', { name: 'As understood', exact: true })
  await expect(understood).toContainText('Row 127: “abc” in “Supply (V)” is no voltage.')
  await expect(understood).toContainText('125 readings')
  await understood.getByRole('button', { name: 'Fit a characteristic' }).click()
  await expect(understood).toContainText('Bayesian information criterion', { timeout: 20_000 })
  await expect(page.locator('.reading-dots')).toHaveAttribute('d', /M/)
  await expect(page.locator('.fitted')).toHaveAttribute('d', /M/)
  await understood.getByRole('button', { name: 'Put this characteristic into the design' }).click()

  await openPart(page, 'Figures')
  const knee = page.getByRole('textbox', { name: 'Knee: voltage' })
  const fitted = Number.parseFloat(await knee.inputValue())
  expect(fitted).toBeGreaterThan(71)
  expect(fitted).toBeLessThan(77)
  // The knots of the fit can be moved like any others.
  await knee.fill('75.5')
  await knee.press('Enter')
  await page.getByRole('textbox', { name: 'Lamp', exact: true }).fill('Swept lamp no. 1')

  await openPart(page, 'My lamps')
  await page.getByRole('button', { name: /Keep the lamp of this design/ }).click()
  await expect(page.getByRole('textbox', { name: 'Name of Swept lamp no. 1' })).toBeVisible()
  await page.reload()
  await openPart(page, 'My lamps')
  const kept = page.getByRole('textbox', { name: 'Name of Swept lamp no. 1' })
  await expect(kept).toBeVisible()
  await page.getByRole('button', { name: 'Use', exact: true }).click()

  await page.locator('[popovertarget=link]').click()
  const link = await page.getByRole('textbox', { name: 'Link to this design' }).inputValue()
  expect(link.length).toBeLessThan(2100)
  const words = await verdict(page).textContent()
  const elsewhere = await fresh()
  await elsewhere.goto(link)
  await expect(verdict(elsewhere)).toHaveText(words ?? '')
  await openPart(elsewhere, 'Figures')
  await expect(elsewhere.getByRole('textbox', { name: 'Knee: voltage' })).toHaveValue(/^75\.5\s*V$/)
  await expect(elsewhere.getByRole('textbox', { name: 'Lamp', exact: true })).toHaveValue(
    'Swept lamp no. 1',
  )
})

test('a long fit shows how far it is, can be stopped, and the page stays live', async ({
  page,
}) => {
  await openBench(page)
  await openPart(page, 'From a sweep')
  const rows = Array.from({ length: 100_000 }, (_, k) => {
    const supply = k < 50_000 ? 10 + (k / 50_000) * 240 : 250 - ((k - 50_000) / 50_000) * 240
    const lamp = supply < 66 || (k < 50_000 && supply < 75) ? supply : 56 + (supply - 66) * 0.23
    return `${supply.toFixed(3)},${(lamp + (((k * 7919) % 13) - 6) / 100).toFixed(3)}`
  })
  await page.getByLabel('Open a file of readings').setInputFiles({
    name: 'long.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from(`Supply (V),Lamp (V)\n${rows.join('\n')}\n`),
  })
  const understood = page.getByRole('region', { name: 'As understood', exact: true })
  await expect(understood).toContainText('100000 readings', { timeout: 20_000 })
  await understood.getByRole('button', { name: 'Fit a characteristic' }).click()
  await expect(understood.getByRole('progressbar')).toBeVisible()
  // Live: another part of the page answers while the worker works.
  await page.getByRole('radio', { name: 'Linear' }).check({ force: true })
  await expect(page.getByText(/lamp current, µA/)).toBeVisible()
  await understood.getByRole('button', { name: 'Stop' }).click()
  await expect(understood).toContainText(/Stopped|criterion/, { timeout: 20_000 })
})

test('a lamp from the catalogue comes with its sources, and its spread is said to be guessed', async ({
  page,
}) => {
  await openBench(page)
  await openPart(page, 'Catalogue')
  await page.getByRole('radio', { name: /^C2A/ }).check()
  const known = page.getByRole('region', { name: 'What is known of this lamp' })
  await expect(known).toContainText('SPC Technology data sheet')
  await expect(known).toContainText('95\u00A0V ac × √2 = 134\u00A0V')
  await expect(known).toContainText('(guessed)')
  await known.getByRole('button', { name: 'Put this lamp into the design' }).click()
  await expect(page.locator('.circuit .lamp-name')).toHaveText(/C2A/)
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect(page.locator('.circuit .lamp-name')).not.toHaveText(/C2A/)
})

test('flashes counted at three voltages give strike and extinction, and what to count next', async ({
  page,
}) => {
  await openBench(page)
  await openPart(page, 'From a watch')
  const counts = [
    ['110', '40', '20 s'],
    ['130', '56', '20'],
    ['150', '72', '20'],
  ]
  for (const [row, cells] of counts.entries()) {
    for (const [k, name] of ['Supply', 'Flashes', 'Counted in'].entries()) {
      await page.getByLabel(`${name}, row ${row + 1}`, { exact: true }).fill(cells[k] ?? '')
    }
  }
  const said = page.getByRole('region', { name: 'What they say' })
  await expect(said).toContainText(/Strikes at\s+\d+(\.\d+)?\sV ±/)
  await expect(said).toContainText('The next count that would help most')
  await said.getByRole('button', { name: 'Give the lamp in the design these voltages' }).click()
  await openPart(page, 'Figures')
  const knee = Number.parseFloat(
    await page.getByRole('textbox', { name: 'Knee: voltage' }).inputValue(),
  )
  expect(knee).toBeGreaterThan(65)
  expect(knee).toBeLessThan(76)
  await openPart(page, 'From a watch')
  await page.getByLabel('Supply, row 2', { exact: true }).fill('a lot')
  await expect(page.getByRole('region', { name: 'What they say' })).toContainText('Row 2, supply')
})

test('darkness makes it strike later, says so in the verdict, and is off again at a click', async ({
  page,
}) => {
  await openBench(page)
  await openPart(page, 'Conditions')
  const before = await verdict(page).textContent()
  await page.getByRole('checkbox', { name: /as it is under these conditions/ }).check()
  await page.getByRole('radio', { name: 'dim', exact: true }).check({ force: true })
  await expect(page.locator('.advice.conditions')).toContainText(
    'In dim light it strikes up to 5\u00A0V later',
  )
  await expect(page.locator('[data-grab^="knot"]')).toHaveCount(0)
  await page.getByRole('checkbox', { name: /as it is under these conditions/ }).uncheck()
  await expect(verdict(page)).toHaveText(before ?? '')
  await expect(page.locator('[data-grab^="knot"]')).toHaveCount(4)
})

test('strike tests give mean and scatter, and name the cell that cannot be read', async ({
  page,
}) => {
  await openBench(page)
  await openPart(page, 'From strike tests')
  for (const [row, [strike, out]] of [
    ['74.2', '54.8'],
    ['75.0', '55.2'],
    ['74.6', 'x'],
  ].entries()) {
    await page.getByLabel(`Struck at, row ${row + 1}`, { exact: true }).fill(strike ?? '')
    await page.getByLabel(`Went out at, row ${row + 1}`, { exact: true }).fill(out ?? '')
  }
  const said = page.getByRole('region', { name: 'What they say' })
  await expect(said).toContainText('Row 3, went out at')
  await page.getByLabel('Went out at, row 3', { exact: true }).fill('55')
  await expect(said).toContainText(/Strikes at\s+74\.6\sV \(mean of 3/)
})

test('own lamps are copied, renamed, removed and brought back, and go through a file', async ({
  page,
  fresh,
}) => {
  await openBench(page)
  await openPart(page, 'My lamps')
  await page.getByRole('button', { name: /Keep the lamp of this design/ }).click()
  await page.getByRole('button', { name: 'Copy', exact: true }).click()
  const copy = page.getByRole('textbox', { name: 'Name of Generic small standard lamp (2)' })
  await copy.fill('Spare')
  await copy.press('Enter')
  await expect(page.getByRole('textbox', { name: 'Name of Spare' })).toBeVisible()
  await page.getByRole('button', { name: 'Remove Spare' }).click()
  await expect(page.getByRole('textbox', { name: 'Name of Spare' })).toHaveCount(0)
  await page.getByRole('button', { name: 'Bring back Spare' }).click()
  await expect(page.getByRole('textbox', { name: 'Name of Spare' })).toBeVisible()
  const saved = page.waitForEvent('download')
  await page.getByRole('button', { name: 'Save all as a file' }).click()
  const path = await (await saved).path()
  const elsewhere = await fresh()
  await elsewhere.goto(page.url().replace(/#.*/, ''))
  await openPart(elsewhere, 'My lamps')
  await elsewhere.getByLabel('Open a file of lamps').setInputFiles(path)
  await expect(elsewhere.getByRole('status').filter({ hasText: '2 lamps added' })).toBeVisible()
  await expect(elsewhere.getByRole('textbox', { name: 'Name of Spare' })).toBeVisible()
})

test('no part of the lamp’s panel needs sideways scrolling on a phone', async ({ page }) => {
  await page.setViewportSize({ width: 390, height: 844 })
  await openBench(page)
  for (const part of [
    'Figures',
    'Catalogue',
    'From a sweep',
    'From strike tests',
    'From a watch',
    'Recovery time',
    'Conditions',
    'My lamps',
  ]) {
    await openPart(page, part)
    const beyond = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    )
    expect.soft(beyond, part).toBe(0)
  }
})
