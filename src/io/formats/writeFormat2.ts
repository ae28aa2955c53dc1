import { type Design, type LampDetails, typedDetails } from '../../core'
import { nameFormat1, packFormat1 } from './writeFormat1'

/** How much of what is known of the lamp goes along. */
export type Share = 'all' | 'without readings' | 'without readings and facts'

/** Only what differs from a lamp that was merely typed; null where nothing does. */
function differing(details: LampDetails, share: Share): Partial<LampDetails> | null {
  const less: LampDetails = {
    ...details,
    ...(share === 'all' ? {} : { measured: null }),
    ...(share === 'without readings and facts' ? { facts: [] } : {}),
  }
  const entries = Object.entries(less).filter(
    ([key, value]) =>
      JSON.stringify(value) !== JSON.stringify(typedDetails[key as keyof LampDetails]),
  )
  return entries.length === 0 ? null : Object.fromEntries(entries)
}

/** A design with named fields. */
export function nameFormat2(design: Design): unknown {
  const named = nameFormat1(design) as Readonly<Record<string, unknown>>
  return design.lampDetails === undefined
    ? named
    : { ...named, lampDetails: differing(design.lampDetails, 'all') ?? {} }
}

/** The same as lists, for links. */
export function packFormat2(design: Design, share: Share): unknown {
  const lists = packFormat1(design) as readonly unknown[]
  const details = design.lampDetails === undefined ? null : differing(design.lampDetails, share)
  return details === null ? lists : [...lists, details]
}
