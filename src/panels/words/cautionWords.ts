import { type Caution, formatQuantity } from '../../core'

/** A caution as a person reads it, and where its limit comes from. */
export type CautionWords = { readonly text: string; readonly source: string }

/** Puts a caution into words. */
export function cautionWords(caution: Caution): CautionWords {
  switch (caution.kind) {
    case 'voltage':
      return {
        text: `${formatQuantity(caution.voltage, 'V')} is dangerous to touch: the limit is 60 V dc. Switch off and discharge before you reach in; one hand, insulated tools, rated probes.`,
        source: 'IEC 61010-1, 6.3.1 (as quoted in secondary sources)',
      }
    case 'charge':
      return {
        text: `The capacitor can hold ${formatQuantity(caution.charge, 'C')} at ${formatQuantity(caution.voltage, 'V')}, more than the 45 µC that may be touched. Discharge it through a resistor, then check with a meter.`,
        source: 'IEC 61010-1, 6.3.1; IEC 60335-1, 8.1.4 (as quoted in secondary sources)',
      }
    case 'dark is not discharged':
      return {
        text: `A dark lamp does not mean a discharged capacitor: up to ${formatQuantity(caution.voltage, 'V')} may still be on it.`,
        source: 'follows from the strike voltage',
      }
  }
}

/** Stands wherever there is any caution. */
export const mainsCaution =
  'Fed from the mains? Follow your local codes; mains work belongs to licensed people.'
