import type { Knot } from './lamp'

/**
 * A generic small standard-brightness lamp to start from until the one in the hand is measured:
 * knee 75 V at 0.2 µA, valley 55 V at 90 µA, 60 V at 0.6 mA, 84 V at 8 mA.
 *
 * Source: from memory and derived; no data sheet was read for this curve. Single lamps of the kind
 * strike anywhere from 60 to 90 V, so no value here decides that something is safe. The strike
 * voltage lies under the 90 V dc maximum for A1A, whose design current is 0.6 mA (SPC Technology
 * data sheet for A1A/A1B/A1C/C2A/A9A).
 */
export const genericSmallLamp: readonly Knot[] = [
  { current: 0, voltage: 0 },
  { current: 0.2e-6, voltage: 75 },
  { current: 90e-6, voltage: 55 },
  { current: 0.6e-3, voltage: 60 },
  { current: 8e-3, voltage: 84 },
]
