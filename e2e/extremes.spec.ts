import type { Page } from '@playwright/test'
import { type Design, genericSmallLamp, type Stage } from '../src/core'
import { writeDesignFile } from '../src/io/designFile'
import { expect, frames, openBench, test } from './support/bench'
import { designWith } from './support/designs'
import {
  allSpoken,
  choose,
  designInAddress,
  openPanel,
  rangeOf,
  savedDesign,
  stageField,
  verdict,
} from './support/readings'

const lamp: Stage['lamp'] = { knots: genericSmallLamp, recoveryTime: 0, strikeDelay: 0 }

/** Rises and falls by turns, with currents from a femtoamp on. */
const manyKnots = Array.from({ length: 64 }, (_, k) =>
  k === 0
    ? { current: 0, voltage: 0 }
    : { current: 1e-15 * 10 ** (k / 4.5), voltage: 60 + (k % 2 === 0 ? -12 : 12) + k / 4 },
)

const stages: Readonly<Record<string, Partial<Stage>>> = {
  'no voltage at all': { supplyVoltage: 0 },
  '20 kV': { supplyVoltage: 20e3 },
  '1 Ω': { seriesResistance: 1, sourceResistance: 0 },
  'no resistance at all': { seriesResistance: 0, sourceResistance: 0 },
  '10 TΩ': { seriesResistance: 1e13 },
  'one farad': { capacitance: 1 },
  'no capacitor': { capacitance: 0 },
  '10 MΩ in the lead': { leadResistance: 1e7 },
  '10 TΩ in the lead': { leadResistance: 1e13 },
  'a short across the capacitor': { leakageResistance: 1e-3 },
  'leakage that takes nearly all': { leakageResistance: 3.2e6 },
  '20 kV through 10 TΩ into one farad': {
    supplyVoltage: 20e3,
    seriesResistance: 1e13,
    capacitance: 1,
  },
  '64 knots': { lamp: { ...lamp, knots: manyKnots } },
  'two knots': { lamp: { ...lamp, knots: manyKnots.slice(0, 2) } },
  'a lamp that only rises': {
    lamp: {
      ...lamp,
      knots: [
        { current: 0, voltage: 0 },
        { current: 100, voltage: 20e3 },
      ],
    },
  },
  'a lamp that strikes at nothing': {
    lamp: { ...lamp, knots: [0, 1, 2].map((k) => ({ current: k * 1e-3, voltage: 0 })) },
  },
  'a recovery of 1000 s': { lamp: { ...lamp, recoveryTime: 1000 } },
  'a strike delay of 1000 s': { lamp: { ...lamp, strikeDelay: 1000 } },
}

const notANumber = /NaN|Infinity|undefined|null|\[object|∞/

/** All that a person can see or hear of the page, and every attribute of what is drawn. */
async function everyWord(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const words: string[] = [document.body.textContent ?? '']
    for (const element of document.querySelectorAll('*')) {
      if (element instanceof HTMLInputElement) words.push(element.value)
      for (const { name, value } of element.attributes) {
        if (element.closest('svg') !== null || /^(?:aria-|title$|value$|min$|max$)/.test(name)) {
          words.push(`${element.tagName} ${name}=${value}`)
        }
      }
      if (element instanceof SVGTextElement) words.push(element.textContent ?? '')
    }
    return words
  })
}

async function open(page: Page, design: Design): Promise<void> {
  const written = writeDesignFile(design)
  if (!written.ok) throw new Error(written.message)
  await page.getByLabel('Open a saved design').setInputFiles({
    name: 'x.json',
    mimeType: 'application/json',
    buffer: Buffer.from(written.text),
  })
  await expect(page.getByRole('textbox', { name: 'Title of the design' })).toHaveValue(design.title)
}

async function stands(page: Page, what: string): Promise<void> {
  await frames(page)
  const heading = verdict(page)
  await expect(heading, what).toBeVisible()
  await expect(heading).toHaveAttribute(
    'data-verdict',
    /^(?:flashes|stays dark|stays lit|latches|over range)$/,
  )
  expect(await heading.textContent(), what).toMatch(/\w+.*\.$/)
  const wrong = (await everyWord(page)).filter((text) => notANumber.test(text))
  expect(
    wrong.map((text) => text.slice(0, 300)),
    what,
  ).toEqual([])
  const wide = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  )
  expect(wide, what).toBe(0)
}

/** Looks at one stage in every way the page can show it, and steps its handles. */
async function lookAtAll(page: Page, what: string): Promise<void> {
  await stands(page, what)
  await choose(page, 'Current axis', 'Linear')
  await stands(page, `${what}, linear`)
  for (const span of ['One flash', 'From switch-on']) {
    const choice = page.getByRole('group', { name: 'Time' }).getByRole('radio', { name: span })
    if ((await choice.count()) > 0) {
      await choice.check()
      await stands(page, `${what}, ${span}`)
    }
  }
  for (const of of ['plane', 'time']) {
    await page.getByRole('button', { name: `Zoom the ${of} in` }).click()
    await page.getByRole('button', { name: `Zoom the ${of} out` }).click()
  }
  await page.getByRole('button', { name: 'Step on to the next corner' }).click()
  await openPanel(page, 'Lamp')
  await expect(page.getByRole('region', { name: 'Name and times' })).toBeVisible()
  const said = await allSpoken(page)
  await rangeOf(page, 'supply').press('PageUp')
  await rangeOf(page, 'slope').press('PageDown')
  await rangeOf(page, 'knot-1').last().press('PageDown')
  expect((await allSpoken(page)).length).toBe(said.length)
  await page.setViewportSize({ width: 390, height: 844 })
  await stands(page, `${what}, 390 px, lamp’s figures`)
}

const names = Object.keys(stages)
for (let from = 0; from < names.length; from += 6) {
  const group = names.slice(from, from + 6)
  test(`the page stays up, with a verdict and no figure that is none: ${group.join(', ')}`, async ({
    page,
  }) => {
    test.slow()
    await openBench(page)
    for (const what of group) {
      await page.setViewportSize({ width: 1440, height: 900 })
      await choose(page, 'Current axis', 'Logarithmic')
      await openPanel(page, 'Figures')
      await open(page, designWith(stages[what]!, what))
      await lookAtAll(page, what)
    }
  })
}

test('extreme values can be typed', async ({ page }) => {
  await openBench(page)
  for (const [label, typed, shown] of [
    ['Supply', '0', /^0\sV$/],
    ['Supply', '20 kV', /^20\skV$/],
    ['Series resistor', '10 TΩ', /^10\sTΩ$/],
    ['Series resistor', '1', /^1\sΩ$/],
    ['Series resistor', '0', /^0\sΩ$/],
    ['Capacitor', '1 F', /^1\sF$/],
    ['Lead resistor', '10M', /^10\sMΩ$/],
    ['Leakage', '1m', /^1\smΩ$/],
  ] as const) {
    await stageField(page, label).fill(typed)
    await stageField(page, label).press('Enter')
    await expect(stageField(page, label)).toHaveValue(shown)
    await stands(page, `${label} ${typed}`)
  }
})

test('a lamp of 64 knots takes no more, and says so', async ({ page }) => {
  await openBench(page)
  await open(page, designWith(stages['64 knots']!, '64 knots'))
  await openPanel(page, 'Lamp')
  await page.getByRole('button', { name: 'Add a knot after Origin' }).click()
  await expect(page.getByText('at most 64 knots')).toBeVisible()
})

test('a design too long for a link says so, is still saved as a file, and is kept', async ({
  page,
}) => {
  await openBench(page)
  const knots = manyKnots.map(({ current, voltage }, k) => ({
    current: current * (1 + Math.sin(k) / 100),
    voltage: k === 0 ? 0 : voltage + Math.cos(k) / 7,
  }))
  // Text with no pattern in it, which does not get shorter in a link.
  const note = Array.from({ length: 400 }, (_, k) =>
    String.fromCharCode(48 + Math.floor((((k + 1) * 0.6180339887 * (k + 7)) % 1) * 74)),
  )
  const long: Design = {
    ...designWith({ lamp: { ...lamp, knots } }, 'Measured with care'),
    note: note.join(''),
  }
  await open(page, long)
  await page.getByRole('button', { name: 'Link', exact: true }).click()
  await expect(page.locator('#link')).toContainText(/save a file instead/)
  await page.keyboard.press('Escape')
  expect(await savedDesign(page)).toEqual(long)
  await expect
    .poll(() => page.evaluate(() => localStorage.getItem('glowloop.design')))
    .toContain('Measured with care')
  // An address that cannot hold the design does not hold another one.
  expect(designInAddress(page)).toBeNull()
  await openBench(page)
  expect(await savedDesign(page)).toEqual(long)
})
