import { type Design, genericSmallLamp, type Stage } from '../core'

/** A worked design to start from. */
export type Example = {
  /** Never changes; letters and hyphens. */
  readonly id: string
  /** What it shows, in a few words. */
  readonly shows: string
  readonly design: Design
}

// The times of a single lamp are seldom known; zero takes them as too short to matter.
const lamp: Stage['lamp'] = { knots: genericSmallLamp, recoveryTime: 0, strikeDelay: 0 }
const lampName = 'Generic small standard lamp'

/**
 * Flashes: the load line passes 20 µA at the knee and 30 µA at the valley, between the 0.2 µA and
 * 90 µA of the lamp. Eight 15 V layer stacks, 200 Ω each from within the 100 … 300 Ω known from
 * memory.
 */
export const mooringBeacon: Example = {
  id: 'mooring-beacon',
  shows: 'A blinker that flashes about two and a half times a second',
  design: {
    title: 'Mooring beacon',
    note:
      'Marks the outer mooring at night. Eight 15 V layer stacks in series, 200 Ω each, in the ' +
      'boathouse locker. 120 V hurts, and the capacitor holds its charge when the lamp has gone ' +
      'dark: disconnect and discharge before touching.',
    lampName,
    stage: {
      supplyVoltage: 120,
      sourceResistance: 1600,
      seriesResistance: 2.2e6,
      capacitance: 0.47e-6,
      leakageResistance: Number.POSITIVE_INFINITY,
      leadResistance: 0,
      lamp,
    },
  },
}

/** Stays lit: 33 kΩ lets more than the valley current flow on the glow branch. */
const panelIndicator: Example = {
  id: 'panel-indicator',
  shows: 'An indicator that stays lit',
  design: {
    title: 'Workshop panel lamp',
    note:
      'Shows that the 150 V rail of the test bench is live. Bright, about 2.5 mA: well above the ' +
      'usual 0.6 mA of a standard lamp, so it ages fast; 150 kΩ would bring it to that.',
    lampName,
    stage: {
      supplyVoltage: 150,
      sourceResistance: 0,
      seriesResistance: 33e3,
      capacitance: 0,
      leakageResistance: Number.POSITIVE_INFINITY,
      leadResistance: 0,
      lamp,
    },
  },
}

/**
 * Stays dark: ten blocks run down to 6.8 V each make 68 V, short of the 75 V the lamp strikes at.
 * Source resistance 35 Ω each, as a fresh 6F22 has (from memory).
 */
const darkGate: Example = {
  id: 'dark-gate',
  shows: 'A blinker gone dark: its supply no longer reaches the strike voltage',
  design: {
    title: 'Gate blinker, dark since March',
    note:
      'Ten 9 V blocks in series, down to 6.8 V each: 68 V, and the lamp strikes at 75 V. Dark is ' +
      'not discharged: the capacitor sits at almost 68 V. Disconnect and discharge before touching.',
    lampName,
    stage: {
      supplyVoltage: 68,
      sourceResistance: 350,
      seriesResistance: 1e6,
      capacitance: 1e-6,
      leakageResistance: Number.POSITIVE_INFINITY,
      leadResistance: 0,
      lamp,
    },
  },
}

/** Worked designs: one that flashes, one that stays lit, one that stays dark. */
export const examples: readonly Example[] = [mooringBeacon, panelIndicator, darkGate]
