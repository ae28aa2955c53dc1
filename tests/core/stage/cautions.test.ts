import { describe, expect, it } from 'vitest'
import {
  type Caution,
  cautionsFor,
  type Stage,
  touchChargeLimit,
  touchVoltageLimit,
} from '../../../src/core/index'
import { knotsOf, stageOf } from '../../support/stages'

function caution<K extends Caution['kind']>(stage: Stage, kind: K) {
  return cautionsFor(stage).find(
    (found): found is Extract<Caution, { kind: K }> => found.kind === kind,
  )
}

describe('the caution about voltage', () => {
  it('begins above 60 V dc', () => {
    // 60 V dc [S: IEC 61010-1, 6.3.1, quoted on a product-safety list; IEC 60598-1, 8.2.3, likewise].
    expect(touchVoltageLimit).toBe(60)
    expect(caution(stageOf({ supplyVoltage: 60 }), 'voltage')).toBeUndefined()
    expect(caution(stageOf({ supplyVoltage: 60.001 }), 'voltage')?.voltage).toBe(60.001)
  })

  it('counts the supply itself, whatever resistors and leakage leave further on', () => {
    const stage = stageOf({ supplyVoltage: 300, leakageResistance: 1e3 })
    expect(caution(stage, 'voltage')?.voltage).toBe(300)
    expect(cautionsFor(stage)).toHaveLength(1)
  })
})

describe('the caution about charge', () => {
  // 45 µC up to 15 kV [S: as above; IEC 60335-1, 8.1.4], so 0.5 µF at 90 V, 0.225 µF at 200 V and 0.112 µF at
  // 400 V [D]; the last is rounded down, so a little more is just over.
  it.each([
    [90, 0.5e-6],
    [200, 0.225e-6],
    [400, 0.1125e-6],
  ])('begins above 45 µC: at %d V with %d F', (supplyVoltage, capacitance) => {
    expect(touchChargeLimit).toBe(45e-6)
    const at = (factor: number) =>
      caution(stageOf({ supplyVoltage, capacitance: capacitance * factor }), 'charge')
    expect(at(0.999)).toBeUndefined()
    expect(at(1.001)?.charge).toBeCloseTo(45.045e-6, 12)
    expect(at(1.001)?.voltage).toBe(supplyVoltage)
  })

  it('takes the capacitor as charged as the supply can charge it, not as the lamp lets it', () => {
    // The lamp strikes at 75 V; out of its holder the capacitor comes to 120 V.
    expect(caution(stageOf({ capacitance: 0.4e-6 }), 'charge')?.charge).toBeCloseTo(48e-6, 12)
  })

  it('takes in what leakage keeps it from', () => {
    const stage = stageOf({ capacitance: 0.6e-6, leakageResistance: 2.2e6 })
    expect(caution(stage, 'charge')).toBeUndefined()
    expect(caution({ ...stage, capacitance: 0.8e-6 }, 'charge')?.voltage).toBeCloseTo(60, 12)
  })
})

describe('the caution that dark is not discharged', () => {
  it('stands wherever a capacitor can keep more than 60 V', () => {
    expect(caution(stageOf(), 'dark is not discharged')?.voltage).toBeGreaterThan(60)
    expect(caution(stageOf({ supplyVoltage: 60 }), 'dark is not discharged')).toBeUndefined()
    expect(caution(stageOf({ capacitance: 0 }), 'dark is not discharged')).toBeUndefined()
  })

  it('stands too for a lamp that never strikes, at all the supply gives', () => {
    const stage = stageOf({ knots: knotsOf([0, 0], [1e-6, 70], [1, 200]) })
    expect(caution(stage, 'dark is not discharged')?.voltage).toBe(120)
    const short = stageOf({ supplyVoltage: 70 })
    expect(caution(short, 'dark is not discharged')?.voltage).toBe(70)
  })
})

describe('no caution', () => {
  it('stands on a bench with nothing switched on', () => {
    expect(cautionsFor(stageOf({ supplyVoltage: 0 }))).toEqual([])
  })
})
