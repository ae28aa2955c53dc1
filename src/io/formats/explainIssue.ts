import type * as v from 'valibot'
import { faultInKnots, formatQuantity, type Knot } from '../../core'
import { designLimits, knotCount, type Limit, textLimits } from '../designLimits'

const limits: Readonly<Record<string, Limit>> = designLimits
const texts: Readonly<Record<string, { readonly words: string; readonly most: number }>> =
  textLimits

/** Says in a plain sentence what is wrong with a design that did not pass its schema. */
export function explainIssue(issue: v.BaseIssue<unknown>): string {
  const keys = issue.path?.map(({ key }) => key) ?? []
  const field = String(keys.at(-1) ?? '')
  if (Object.hasOwn(limits, field)) return explainNumber(field, issue, keys)
  if (Object.hasOwn(texts, field)) return explainText(field, issue)
  if (field === 'knots') return explainKnots(issue)
  return field === ''
    ? 'What was opened is not a design.'
    : `The design is not complete: “${keys.join(' ')}” is missing or of the wrong kind.`
}

function explainNumber(
  field: string,
  issue: v.BaseIssue<unknown>,
  keys: readonly unknown[],
): string {
  const { words, unit, least, aboveLeast, most } = limits[field] as Limit
  const place = keys.at(-2)
  const name = typeof place === 'number' ? `${words} of knot ${place + 1}` : words
  const write = (value: number) => formatQuantity(value, unit, { figures: 'all' })
  const range = `must be a number ${aboveLeast ? 'above' : 'from'} ${write(least)} ${aboveLeast ? 'and up ' : ''}to ${write(most)}`
  const none = field === 'leakageResistance' ? ', or none' : ''
  const found = sayFound(issue.input, write)
  return `The ${name} ${range}${none}; here ${found}.`
}

function explainText(field: string, { input }: v.BaseIssue<unknown>): string {
  const { words, most } = texts[field] ?? { words: field, most: 0 }
  return typeof input === 'string'
    ? `The ${words} may be at most ${most} characters long; here it has ${input.length}.`
    : `The ${words} must be text; here it is ${input === undefined ? 'missing' : 'something else'}.`
}

function explainKnots({ input, type }: v.BaseIssue<unknown>): string {
  if (!Array.isArray(input)) return 'The knots of the lamp must be a list; here they are not.'
  if (type === 'check') return faultInKnots(input as Knot[]) ?? 'The knots are no characteristic.'
  return `A characteristic has ${knotCount.least} to ${knotCount.most} knots; this one has ${input.length}.`
}

function sayFound(input: unknown, write: (value: number) => string): string {
  if (typeof input === 'number' && !Number.isNaN(input)) return `it is ${write(input)}`
  if (input === undefined) return 'it is missing'
  return input === null ? 'it is empty' : 'it is not a number'
}
