import { highFamily, type LampFamily, standardFamily } from './catalogueCurves'
import { type Figure, guessed, onSheet, remembered } from './catalogueFigure'

/** One kind of lamp in the catalogue; null where nothing is known. SI throughout. */
export type CatalogueEntry = {
  /** Never changes once given. */
  readonly id: string
  /** ANSI designation with the industry number, or plain words. */
  readonly name: string
  readonly designation: string | null
  readonly industryNumber: Figure<string> | null
  readonly family: LampFamily
  readonly brightness: Figure<'standard' | 'high'>
  /** Highest strike voltage of a good new lamp in the light: V root mean square, and V dc. */
  readonly strikeAc: Figure | null
  readonly strikeDc: Figure | null
  /** A */
  readonly designCurrent: Figure | null
  /** For a steady glow on 105–125 V ac, Ω. */
  readonly seriesResistor: Figure | null
  /** At the design current, s. */
  readonly life: Figure | null
}

const hour = 3600
const standardLife = 25_000 * hour

/** Design current, A; highest strike, V ac and V dc; series resistor, Ω; all of one source. */
type Row = readonly [current: number, ac: number, dc: number, resistor: number]

function entry(
  id: string,
  industryNumber: string | null,
  family: LampFamily,
  [current, ac, dc, resistor]: Row,
  source: <Value>(value: Value) => Figure<Value>,
): CatalogueEntry {
  return {
    id,
    name: industryNumber === null ? id : `${id} (${industryNumber})`,
    designation: id,
    industryNumber: industryNumber === null ? null : remembered(industryNumber),
    family,
    brightness: source(family.brightness),
    strikeAc: source(ac),
    strikeDc: source(dc),
    designCurrent: source(current),
    seriesResistor: source(resistor),
    life: source(standardLife),
  }
}

function generic(id: string, name: string, family: LampFamily, current: Figure): CatalogueEntry {
  return {
    id,
    name,
    designation: null,
    industryNumber: null,
    family,
    brightness: { value: family.brightness, basis: 'derived', source: 'the kind chosen' },
    strikeAc: null,
    strikeDc: null,
    designCurrent: current,
    seriesResistor: null,
    life: null,
  }
}

/**
 * Small glow lamps by designation, and two generic ones for a lamp with no marking. The five of the data
 * sheet: SPC Technology data sheet for A1A/A1B/A1C/C2A/A9A; strike is its maximum, resistors are for a
 * steady glow on 105–125 V ac. B1A is from memory throughout.
 */
export const catalogue: readonly CatalogueEntry[] = [
  entry('A1A', 'NE-2', standardFamily, [0.6e-3, 65, 90, 100e3], onSheet),
  entry('A1B', null, standardFamily, [0.3e-3, 65, 90, 220e3], onSheet),
  entry('A9A', 'NE-2E', standardFamily, [0.7e-3, 65, 90, 100e3], onSheet),
  entry('A1C', null, highFamily, [1.2e-3, 95, 135, 47e3], onSheet),
  entry('C2A', 'NE-2H', highFamily, [1.9e-3, 95, 135, 30e3], onSheet),
  entry('B1A', 'NE-51', standardFamily, [0.3e-3, 65, 90, 220e3], remembered),
  generic('small standard', 'Small lamp, standard brightness', standardFamily, remembered(0.6e-3)),
  generic(
    'small high',
    'Small lamp, high brightness',
    highFamily,
    guessed(1.5e-3, 'between those of A1C and C2A'),
  ),
]

/** The entry of an id; null of none. */
export function catalogueEntry(id: string): CatalogueEntry | null {
  return catalogue.find((each) => each.id === id) ?? null
}
