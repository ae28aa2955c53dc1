import { useStore } from 'zustand'
import { createStore } from 'zustand/vanilla'
import type { Knot } from '../core'

/** A table as typed: rows of cells, read only when reckoned with, so that nothing typed is lost. */
export type TypedTable = readonly (readonly string[])[]

/** Readings being taken; they become part of a design when a lamp made of them is put into it. */
export type ReadingsState = {
  /** The sweep as typed, pasted or opened. */
  readonly sweepText: string
  /** What the plane shows of it: points, A and V across the lamp, and the fitted knots. */
  readonly sweepShown: {
    readonly points: readonly Knot[]
    readonly knots: readonly Knot[] | null
  } | null
  readonly sweepSetup: {
    readonly seriesResistance: number
    readonly meterResistance: number
    readonly meterPlace: 'lamp' | 'supply' | 'resistor'
    /** V, and as a fraction of the reading; both 0 = to be estimated from the scatter. */
    readonly absoluteError: number
    readonly relativeError: number
    readonly resistorTolerance: number
  }
  /** Strike, drop-out; and the surroundings of each try. */
  readonly strikeRows: TypedTable
  /** V/s; 0 = raised by hand at no known rate. */
  readonly rampRate: number
  /** Supply, flashes, time. */
  readonly rateRows: TypedTable
  readonly rateParts: {
    readonly seriesResistance: number
    readonly resistanceTolerance: number
    readonly capacitance: number
    readonly capacitanceTolerance: number
  }
  readonly countedRate: number
  readonly rateUncertainty: number
}

const first: ReadingsState = {
  sweepText: '',
  sweepShown: null,
  sweepSetup: {
    seriesResistance: 100e3,
    meterResistance: 10e6,
    meterPlace: 'lamp',
    absoluteError: 0,
    relativeError: 0,
    resistorTolerance: 0.01,
  },
  strikeRows: [
    ['', '', 'lit'],
    ['', '', 'lit'],
    ['', '', 'lit'],
  ],
  rampRate: 0,
  rateRows: [
    ['', '', ''],
    ['', '', ''],
    ['', '', ''],
  ],
  rateParts: {
    seriesResistance: 2.2e6,
    resistanceTolerance: 0.05,
    capacitance: 0.47e-6,
    capacitanceTolerance: 0.1,
  },
  countedRate: 0,
  rateUncertainty: 0.02,
}

/** The readings on this page. */
const readingsStore = createStore<ReadingsState>()(() => first)

/** One part of the readings; select what is there already. */
export function useReadings<T>(select: (state: ReadingsState) => T): T {
  return useStore(readingsStore, select)
}

/** Notes readings down. */
export const noteDown = (patch: Partial<ReadingsState>): void => readingsStore.setState(patch)
