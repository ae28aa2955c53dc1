import { expect, openBench, test } from './support/bench'
import {
  choose,
  echoOf,
  openPanel,
  plain,
  savedDesign,
  stageField,
  undoButton,
  verdict,
} from './support/readings'

test.beforeEach(async ({ page }) => {
  await page.setViewportSize({ width: 1440, height: 900 })
  await openBench(page)
})

test('values are read the way people write them, said back, and drawn in the circuit', async ({
  page,
}) => {
  const circuit = page.getByRole('img', { name: /^Circuit/ })
  for (const [label, typed, shown, part, value] of [
    ['Series resistor', '4M7', '4.7 MΩ', 'seriesResistance', 4.7e6],
    ['Series resistor', '33k', '33 kΩ', 'seriesResistance', 33e3],
    ['Series resistor', '4.7 MΩ', '4.7 MΩ', 'seriesResistance', 4.7e6],
    ['Series resistor', '3,3 Meg', '3.3 MΩ', 'seriesResistance', 3.3e6],
    ['Capacitor', '0,47u', '470 nF', 'capacitance', 4.7e-7],
    ['Capacitor', '1µ5', '1.5 µF', 'capacitance', 1.5e-6],
    ['Capacitor', '470n', '470 nF', 'capacitance', 4.7e-7],
    ['Supply', '90', '90 V', 'supplyVoltage', 90],
    ['Supply', '112,5 volts', '112.5 V', 'supplyVoltage', 112.5],
    ['Leakage', '2G2', '2.2 GΩ', 'leakageResistance', 2.2e9],
    ['Lead resistor', '4K7', '4.7 kΩ', 'leadResistance', 4700],
    ['Source resistance', '1k5', '1.5 kΩ', 'sourceResistance', 1500],
    ['Leakage', 'none', 'none', 'leakageResistance', Number.POSITIVE_INFINITY],
    ['Capacitor', '', 'none', 'capacitance', 0],
  ] as const) {
    const field = stageField(page, label)
    await field.fill(typed)
    expect(await echoOf(field), typed).toMatch(new RegExp(`^= ${shown.replace('.', '\\.')}`))
    await field.press('Enter')
    expect(plain(await field.inputValue()), typed).toBe(shown)
    expect((await savedDesign(page)).stage[part], typed).toBe(value)
    if (shown !== 'none') await expect(circuit).toContainText(shown.replace('112.5', '113'))
  }
})

test('every part of the lamp can be typed: knots, recovery time, strike delay, name', async ({
  page,
}) => {
  await openPanel(page, 'Lamp')
  for (const [label, typed] of [
    ['Knee: voltage', '82'],
    ['Knee: current', '150n'],
    ['Valley: voltage', '57,5'],
    ['Valley: current', '0.11 mA'],
    ['Knot 5: current', '7m5'],
    ['Recovery time', '300 us'],
    ['Strike delay', '5ms'],
  ] as const) {
    const field = page.getByRole('textbox', { name: label, exact: true })
    await field.fill(typed)
    expect(await echoOf(field), label).toMatch(/^= /)
    await field.press('Enter')
  }
  await page.getByRole('textbox', { name: 'Lamp', exact: true }).fill('From the old radio')
  const { stage, lampName } = await savedDesign(page)
  expect(lampName).toBe('From the old radio')
  expect(stage.lamp.recoveryTime).toBe(3e-4)
  expect(stage.lamp.strikeDelay).toBe(0.005)
  expect(stage.lamp.knots[1]).toEqual({ current: 1.5e-7, voltage: 82 })
  expect(stage.lamp.knots[2]).toEqual({ current: 1.1e-4, voltage: 57.5 })
  expect(stage.lamp.knots[4]).toEqual({ current: 7.5e-3, voltage: 84 })
})

test('knots are added on the characteristic and removed again, each one step', async ({ page }) => {
  await openPanel(page, 'Lamp')
  const before = await savedDesign(page)
  const sentence = await verdict(page).textContent()
  await page.getByRole('button', { name: 'Add a knot after Valley' }).click()
  const more = await savedDesign(page)
  expect(more.stage.lamp.knots).toHaveLength(6)
  // It lies on the line that was there, so that nothing else changes.
  await expect(verdict(page)).toHaveText(sentence!)
  await page.getByRole('button', { name: 'Remove Knot 4' }).click()
  expect(await savedDesign(page)).toEqual(before)
  await undoButton(page).click()
  expect(await savedDesign(page)).toEqual(more)
  await undoButton(page).click()
  expect(await savedDesign(page)).toEqual(before)
})

test('what cannot be read keeps its text, says why, and changes nothing', async ({ page }) => {
  const before = await savedDesign(page)
  for (const [label, typed, why] of [
    ['Series resistor', 'big one', /not understood/],
    ['Series resistor', '12 volts', /resistance/],
    ['Series resistor', '-5', /below zero/],
    ['Series resistor', '99 TΩ', /must be from/],
    ['Capacitor', '470 M', /microfarads/],
    ['Capacitor', '1.2.3', /./],
    ['Supply', '30 kV', /20 kV/],
    ['Supply', '', /Type a voltage/],
    ['Leakage', '0', /must be from/],
  ] as const) {
    const field = stageField(page, label)
    await field.fill(typed)
    await expect(field).toHaveAttribute('aria-invalid', 'true')
    expect(await echoOf(field), typed).toMatch(why)
    await field.blur()
    await expect(field, typed).toHaveValue(typed)
    expect(await echoOf(field), typed).toMatch(why)
    expect(await savedDesign(page), typed).toEqual(before)
    await field.focus()
    await field.press('Escape')
    await expect(field).not.toHaveAttribute('aria-invalid')
  }
  await expect(undoButton(page)).toBeDisabled()
})

test('a value that ends unreadable leaves the design as it was before typing', async ({ page }) => {
  const before = await savedDesign(page)
  const field = stageField(page, 'Supply')
  await field.fill('')
  await field.pressSequentially('12x')
  await field.blur()
  await expect(field).toHaveValue('12x')
  expect((await savedDesign(page)).stage.supplyVoltage).toBe(before.stage.supplyVoltage)
})

test('m is milli and M is mega, and the page says which it read', async ({ page }) => {
  const field = stageField(page, 'Series resistor')
  await field.fill('4.7 M')
  expect(await echoOf(field)).toMatch(/^= 4\.7 MΩ/)
  await field.fill('4.7 m')
  expect(await echoOf(field)).toContain('milliohms')
  expect(await echoOf(field)).toContain('for megohms write M')
})

test('typing letter by letter is one step; Escape puts back what was there', async ({ page }) => {
  const before = await savedDesign(page)
  const field = stageField(page, 'Series resistor')
  await field.focus()
  await page.keyboard.type('4M7')
  await page.keyboard.press('Enter')
  expect((await savedDesign(page)).stage.seriesResistance).toBe(4.7e6)
  await undoButton(page).click()
  expect(await savedDesign(page)).toEqual(before)
  await expect(undoButton(page)).toBeDisabled()

  await field.focus()
  await page.keyboard.type('330k')
  await page.keyboard.press('Escape')
  expect(plain(await field.inputValue())).toBe('2.2 MΩ')
  expect(await savedDesign(page)).toEqual(before)
  await expect(undoButton(page)).toBeDisabled()
})

test('resistor and capacitor step through preferred values by button and by key', async ({
  page,
}) => {
  // IEC 60063: the neighbours of 2.2 and of 4.7 in each series.
  for (const [series, resistors, capacitors] of [
    ['E6', ['3.3 MΩ', '2.2 MΩ', '1.5 MΩ'], ['680 nF', '470 nF', '330 nF']],
    ['E12', ['2.7 MΩ', '2.2 MΩ', '1.8 MΩ'], ['560 nF', '470 nF', '390 nF']],
    ['E24', ['2.4 MΩ', '2.2 MΩ', '2 MΩ'], ['510 nF', '470 nF', '430 nF']],
  ] as const) {
    await choose(page, 'Step resistor and capacitor by', series)
    for (const [label, values] of [
      ['Series resistor', resistors],
      ['Capacitor', capacitors],
    ] as const) {
      const field = stageField(page, label)
      const shown = async () => plain(await field.inputValue())
      const step = (way: 'up' | 'down') =>
        page
          .getByRole('region', { name: 'The stage' })
          .getByRole('button', { name: `${label}: step ${way}`, exact: true })
          .click()
      await step('up')
      expect(await shown(), series).toBe(values[0])
      await step('down')
      expect(await shown(), series).toBe(values[1])
      await step('down')
      expect(await shown(), series).toBe(values[2])
      await field.press('ArrowUp')
      expect(await shown(), series).toBe(values[1])
    }
  }
})

test('a step from between two preferred values goes to the next one', async ({ page }) => {
  const field = stageField(page, 'Series resistor')
  await field.fill('2.5M')
  await field.press('Enter')
  await choose(page, 'Step resistor and capacitor by', 'E12')
  await field.press('ArrowUp')
  expect(plain(await field.inputValue())).toBe('2.7 MΩ')
})

test('a part clicked in the drawn circuit is a part to type', async ({ page }) => {
  for (const [part, label] of [
    ['seriesResistance', 'Series resistor'],
    ['capacitance', 'Capacitor'],
    ['supplyVoltage', 'Supply'],
  ] as const) {
    await page.locator(`g[data-part="${part}"]`).click()
    await expect(stageField(page, label)).toBeFocused()
  }
})

test('every figure has a unit or is a plain word, and explains itself on request', async ({
  page,
}) => {
  const figures = page.getByRole('region', { name: 'Figures' }).locator('details')
  expect(await figures.count()).toBeGreaterThan(12)
  for (const figure of await figures.all()) {
    const name = (await figure.locator('summary').textContent()) ?? ''
    expect(await figure.locator('summary strong').textContent(), name).toMatch(
      /^(?:[\d.,]+\s(?:[fpnµmkMGT]?(?:V|A|Ω|F|s|Hz|W|J|C)|min|h)|any|none|–)$/,
    )
    await expect(figure.locator('p')).toBeHidden()
    await figure.locator('summary').click()
    await expect(figure.locator('p'), name).toHaveText(/\w+ .*\.$/)
  }
})

test('the last of several changes is what counts: verdict, circuit, figures and handles agree', async ({
  page,
}) => {
  await stageField(page, 'Supply').fill('300')
  await stageField(page, 'Series resistor').fill('1M')
  await stageField(page, 'Series resistor').press('Enter')
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'stays lit')
  await expect(page.getByRole('region', { name: 'Resting lit' })).toBeVisible()
  await stageField(page, 'Supply').fill('50')
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'stays dark')
  await expect(page.getByRole('region', { name: 'Resting dark' })).toBeVisible()
  await expect(page.getByRole('slider', { name: /^Supply end/ })).toHaveAttribute(
    'aria-valuetext',
    '50 volts',
  )
})
