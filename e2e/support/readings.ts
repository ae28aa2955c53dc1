import { readFile } from 'node:fs/promises'
import { expect, type Locator, type Page } from '@playwright/test'
import type { Design } from '../../src/core'
import { readDesignFile } from '../../src/io/designFile'
import { openFragment } from '../../src/io/link'
import { frames } from './bench'

/** The sentence above everything; its verdict is in `data-verdict`. */
export const verdict = (page: Page): Locator => page.locator('[data-verdict]')

/** A field of the stage, by its label. */
export const stageField = (page: Page, label: string): Locator =>
  page.getByRole('region', { name: 'The stage' }).getByRole('textbox', { name: label, exact: true })

/** What stands under a field: its hint, or what was understood. */
export async function echoOf(field: Locator): Promise<string> {
  const id = await field.getAttribute('aria-describedby')
  return plain((await field.page().locator(`[id="${id}"]`).textContent()) ?? '')
}

/** A text with ordinary spaces in place of those that keep a number and its unit together. */
export const plain = (text: string): string => text.replace(/\s/g, ' ')

/** A handle's native range: `along` where it moves two ways. */
export const rangeOf = (page: Page, handle: string, along?: 'voltage' | 'current'): Locator =>
  page.locator(
    `input[data-handle="${handle}"]${along === undefined ? '' : `[data-along="${along}"]`}`,
  )

/** What a screen reader says of a handle. */
export const spoken = async (locator: Locator): Promise<string> =>
  (await locator.getAttribute('aria-valuetext')) ?? ''

/** What a screen reader says of all handles. */
export const allSpoken = (page: Page): Promise<(string | null)[]> =>
  page
    .locator('input[data-handle]')
    .evaluateAll((inputs) => inputs.map((input) => input.getAttribute('aria-valuetext')))

/** All handles of the plane: the id of each, as in `data-handle` and `data-grab`. */
export async function handleIds(page: Page): Promise<string[]> {
  const ids = await page
    .locator('input[data-handle]')
    .evaluateAll((inputs) => inputs.map((input) => input.getAttribute('data-handle') ?? ''))
  return [...new Set(ids)]
}

export const undoButton = (page: Page): Locator =>
  page.getByRole('button', { name: 'Undo', exact: true })

export const redoButton = (page: Page): Locator =>
  page.getByRole('button', { name: 'Redo', exact: true })

/** Chooses one of a row of ways to see something. */
export async function choose(page: Page, name: string, words: string): Promise<void> {
  await page
    .getByRole('group', { name, exact: true })
    .getByRole('radio', { name: words, exact: true })
    .check()
  await frames(page)
}

/** Opens one of the panels below the plate. */
export async function openPanel(page: Page, name: string): Promise<void> {
  const button = page
    .getByRole('navigation', { name: 'Panels' })
    .getByRole('button', { name, exact: true })
  await button.click()
  await expect(button).toHaveAttribute('aria-current', 'page')
  await expect(page.getByText('Opening …')).toHaveCount(0)
}

/** The design on the page, exactly, as its Save button writes it. */
export async function savedDesign(page: Page): Promise<Design> {
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Save', exact: true }).click(),
  ])
  const opened = readDesignFile(await readFile(await download.path(), 'utf8'))
  if (!opened.ok) throw new Error(`the page saved what cannot be opened: ${opened.message}`)
  return opened.design
}

/** The design in the page's address; null if there is none or it is damaged. */
export function designInAddress(page: Page): Design | null {
  const opened = openFragment(new URL(page.url()).hash)
  return opened?.ok ? opened.design : null
}

/** All that the page says about a design: texts, every field, verdict, advice and figures. */
export async function everythingShown(page: Page): Promise<Readonly<Record<string, string>>> {
  const shown: Record<string, string> = {
    title: await page.getByRole('textbox', { name: 'Title of the design' }).inputValue(),
    verdict: (await verdict(page).textContent()) ?? '',
    code: (await verdict(page).getAttribute('data-verdict')) ?? '',
    bar: (await page.getByRole('region', { name: 'Verdict and cautions' }).textContent()) ?? '',
    circuit: (await page.getByRole('img', { name: /^Circuit/ }).getAttribute('aria-label')) ?? '',
  }
  await openPanel(page, 'Figures')
  shown.figures = (await page.getByRole('region', { name: 'Figures' }).textContent()) ?? ''
  await openPanel(page, 'Lamp')
  await expect(page.getByRole('region', { name: 'Name and times' })).toBeVisible()
  const fields = page.locator('section input[type="text"]')
  for (const field of await fields.all()) {
    const name = await field.evaluate((input: HTMLInputElement) => input.labels?.[0]?.textContent)
    shown[`field ${name}`] = await field.inputValue()
  }
  for (const range of await page.locator('input[data-handle]').all()) {
    shown[`range ${await range.getAttribute('aria-label')}`] = await spoken(range)
  }
  await openPanel(page, 'Figures')
  return shown
}
