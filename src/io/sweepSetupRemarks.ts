import type { MeterPlace, SweepSetup } from '../core'

/** What a written sweep says of how it was taken. */
export type WrittenSetup = Pick<SweepSetup, 'seriesResistance' | 'meterResistance' | 'meterPlace'>

const placeWords: Readonly<Record<MeterPlace, string>> = {
  lamp: 'across the lamp',
  supply: 'from supply to common',
  resistor: 'across the series resistor',
}

/** The remarks that say how a sweep was taken. */
export function remarksOnSetup(setup: WrittenSetup): readonly string[] {
  const { seriesResistance, meterResistance, meterPlace } = setup
  const meter = Number.isFinite(meterResistance) ? `${meterResistance} ohm` : 'none'
  return [
    `# Series resistor: ${seriesResistance} ohm`,
    `# Meter resistance: ${meter}`,
    `# Meter: ${placeWords[meterPlace]}`,
  ]
}

/** Reads them back; null where any is missing. */
export function setupInRemarks(remarks: readonly string[]): WrittenSetup | null {
  const said = (what: string) =>
    remarks.map((text) => new RegExp(`^# ?${what}: (.+?)[,;\\s]*$`).exec(text)?.[1]).find(Boolean)
  const ohms = (text: string | undefined) =>
    text === 'none' ? Number.POSITIVE_INFINITY : Number(text?.replace(/ ohm$/, ''))
  const seriesResistance = ohms(said('Series resistor'))
  const meterResistance = ohms(said('Meter resistance'))
  const place = said('Meter')
  const meterPlace = (Object.keys(placeWords) as MeterPlace[]).find(
    (key) => placeWords[key] === place,
  )
  if (!(seriesResistance > 0 && meterResistance > 0) || !meterPlace) return null
  return { seriesResistance, meterResistance, meterPlace }
}
