import { genericSmallLamp } from '../stage/genericLamp'
import type { Knot } from '../stage/lamp'
import { derived, type Figure, guessed, published, remembered } from './catalogueFigure'
import type { LampSpread } from './lampRecord'

/** What the small lamps of one brightness have in common. */
export type LampFamily = {
  readonly brightness: 'standard' | 'high'
  readonly fill: Figure<string>
  readonly knots: Figure<readonly Knot[]>
  /** Lamp voltage at the design current, V. */
  readonly holding: Figure
  readonly spread: {
    readonly strike: Figure<LampSpread['strike']>
    readonly extinction: Figure<LampSpread['extinction']>
  }
}

const fillSource = 'internationallight.com, neon lamps'

/** Standard brightness: a neon–argon mixture. */
export const standardFamily: LampFamily = {
  brightness: 'standard',
  fill: published('neon with some argon', fillSource),
  knots: remembered(genericSmallLamp),
  holding: derived(60, 'the typical curve at 0.6 mA, itself from memory'),
  spread: {
    strike: derived(
      { low: 60, typical: 75, high: 90 },
      'high: the 90 V dc maximum of A1A (SPC Technology data sheet); low and typical from memory',
    ),
    extinction: published(
      { low: 50, typical: 55, high: 60 },
      'Braga, institute article min375: 50–60 V; its middle taken as typical',
    ),
  },
}

/** High brightness: pure neon. */
export const highFamily: LampFamily = {
  brightness: 'high',
  fill: published('neon', fillSource),
  knots: guessed(
    [
      { current: 0, voltage: 0 },
      { current: 0.2e-6, voltage: 105 },
      { current: 200e-6, voltage: 65 },
      { current: 1.5e-3, voltage: 72 },
      { current: 14e-3, voltage: 116 },
    ],
    'knee 105 V and valley 65 V from memory; currents and glow branch scaled from the standard lamp',
  ),
  holding: guessed(
    72,
    'the typical curve at 1.5 mA. One general source (internationallight.com) has lamps hold ' +
      '10–20 V below strike, which would be 85–95 V',
  ),
  spread: {
    strike: derived(
      { low: 90, typical: 105, high: 135 },
      'high: the 135 V dc maximum of A1C and C2A (SPC Technology data sheet); typical from memory; ' +
        'low: 90 V, where lamps in general begin to start (internationallight.com)',
    ),
    extinction: guessed(
      { low: 58, typical: 65, high: 80 },
      'typical from memory; low and high in proportion to those of standard lamps, and more above',
    ),
  },
}
