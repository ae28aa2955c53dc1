import { formatQuantity } from '../quantity/formatQuantity'
import type { Knot } from '../stage/lamp'
import { extendGlow } from './extendGlow'
import type { CharacteristicFit } from './fitCharacteristic'
import type { LampFact, LampRecord, PlainData, Span } from './lampRecord'

/** A fit that found a characteristic. */
type Fitted = Extract<CharacteristicFit, { readonly ok: true }>

/**
 * A lamp whose characteristic was fitted to a sweep. Its spread is two standard deviations of knee and valley
 * to each side, wider where the sweep only bounds the knee. A glow branch that ends below strike voltage is
 * carried straight on past it, which is a guess. Says in its facts how well the fit is known.
 */
export function recordWithFit(
  record: LampRecord,
  fit: Fitted,
  measured: PlainData | null,
): LampRecord {
  const strike = (fit.knots[fit.knee] ?? none).voltage
  const knots = extendGlow(fit.knots, enoughAbove * strike) ?? fit.knots
  return {
    ...record,
    origin: 'sweep',
    knots,
    reverseKnots: null,
    spread: {
      strike: spanAt(fit, fit.knee, fit.kneeVoltage),
      extinction: spanAt(fit, fit.valley, null),
    },
    facts: [...factsOfFit(fit), ...(knots === fit.knots ? [] : [carriedOn(fit.knots, knots)])],
    measured,
  }
}

const none: Knot = { current: 0, voltage: 0 }

/** How far above strike voltage the glow branch is carried on, so that a late strike finds it too. */
const enoughAbove = 1.1

function carriedOn(measured: readonly Knot[], extended: readonly Knot[]): LampFact {
  const from = measured.at(-1) ?? none
  const to = extended.at(-1) ?? none
  return {
    label: 'Glow branch above the sweep',
    value: `carried straight on to ${formatQuantity(to.voltage, 'V')} at ${formatQuantity(to.current, 'A')}`,
    source: `guessed: the sweep ends at ${formatQuantity(from.current, 'A')}, below where a flash begins`,
    guessed: true,
  }
}

function spanAt(fit: Fitted, index: number, bounds: readonly [number, number] | null): Span {
  const typical = (fit.knots[index] ?? none).voltage
  const { voltage } = fit.sigma[index] ?? none
  const reach = Number.isFinite(voltage) ? 2 * voltage : 0
  return {
    low: Math.max(0, Math.min(typical - reach, bounds?.[0] ?? typical)),
    typical,
    high: Math.max(typical + reach, bounds?.[1] ?? typical),
  }
}

function factsOfFit(fit: Fitted): LampFact[] {
  const source = 'measured, from a sweep'
  const known = (label: string, index: number): LampFact => {
    const knot = fit.knots[index] ?? none
    const sigma = fit.sigma[index] ?? none
    return {
      label,
      value: `${withError(knot.voltage, sigma.voltage, 'V')} at ${withError(knot.current, sigma.current, 'A')}`,
      source: `${source}; standard deviations`,
      guessed: false,
    }
  }
  return [
    known('Knee', fit.knee),
    known('Valley', fit.valley),
    {
      label: 'Falling region',
      value:
        fit.fallingRegion === 'measured'
          ? 'measured'
          : 'not measured: a straight line between its ends',
      source: fit.fallingRegion === 'measured' ? source : 'guessed: no reading lies in it',
      guessed: fit.fallingRegion !== 'measured',
    },
    {
      label: 'Fit',
      value: `${fit.knots.length} knots, rms ${formatQuantity(fit.rms, 'V', 2)}`,
      source: fit.criterion.name,
      guessed: false,
    },
  ]
}

/** "75.2 V ± 0.3 V"; without the second where nothing bounds it. */
function withError(value: number, sigma: number, unit: 'V' | 'A'): string {
  const own = formatQuantity(value, unit)
  return Number.isFinite(sigma) && sigma > 0 ? `${own} ± ${formatQuantity(sigma, unit, 2)}` : own
}
