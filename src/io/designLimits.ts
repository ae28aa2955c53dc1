/** The range a number of a design must lie in. */
export type Limit = {
  readonly words: string
  readonly unit: 'V' | 'A' | 'Ω' | 'F' | 's'
  readonly least: number
  /** Set where the least value itself is not allowed. */
  readonly aboveLeast?: true
  /** Included. */
  readonly most: number
}

/** The numbers of a design: of its stage, its lamp and the lamp's knots. */
export type DesignNumber =
  | 'supplyVoltage'
  | 'sourceResistance'
  | 'seriesResistance'
  | 'capacitance'
  | 'leakageResistance'
  | 'leadResistance'
  | 'strayCapacitance'
  | 'baseResistance'
  | 'recoveryTime'
  | 'strikeDelay'
  | 'current'
  | 'voltage'

/**
 * Every number of a design with its range: generous for anything with a glow lamp in it, narrow
 * enough that no sum overflows. Own choice, no source. The leakage may also be infinite.
 */
export const designLimits: Readonly<Record<DesignNumber, Limit>> = {
  supplyVoltage: { words: 'supply voltage', unit: 'V', least: 0, most: 20e3 },
  sourceResistance: { words: 'source resistance', unit: 'Ω', least: 0, most: 1e13 },
  seriesResistance: { words: 'series resistor', unit: 'Ω', least: 0, most: 1e13 },
  capacitance: { words: 'capacitor', unit: 'F', least: 0, most: 1 },
  leakageResistance: { words: 'leakage', unit: 'Ω', least: 1e-6, aboveLeast: true, most: 1e13 },
  leadResistance: { words: 'lead resistor', unit: 'Ω', least: 0, most: 1e13 },
  strayCapacitance: {
    words: 'stray capacitance',
    unit: 'F',
    least: 0,
    aboveLeast: true,
    most: 1e-6,
  },
  baseResistance: { words: 'resistor in the base', unit: 'Ω', least: 0, most: 1e13 },
  recoveryTime: { words: 'recovery time', unit: 's', least: 0, most: 1000 },
  strikeDelay: { words: 'strike delay', unit: 's', least: 0, most: 1000 },
  current: { words: 'current', unit: 'A', least: 0, most: 100 },
  voltage: { words: 'voltage', unit: 'V', least: 0, most: 20e3 },
}

/** Longest texts of a design, in UTF-16 units as a text field counts them. */
export const textLimits = {
  title: { words: 'title', most: 80 },
  note: { words: 'note', most: 400 },
  lampName: { words: 'name of the lamp', most: 60 },
} as const

/** Fewest and most knots of a characteristic. */
export const knotCount = { least: 2, most: 64 } as const
