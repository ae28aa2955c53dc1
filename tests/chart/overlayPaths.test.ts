import { describe, expect, it } from 'vitest'
import { currentAxis, linearAxis } from '../../src/chart/axes'
import { overlayPaths } from '../../src/chart/overlayPaths'
import { branchesOf, genericSmallLamp, type Stage, solveStage } from '../../src/core'

const stage: Stage = {
  supplyVoltage: 120,
  sourceResistance: 0,
  seriesResistance: 2.2e6,
  capacitance: 0.47e-6,
  leakageResistance: Number.POSITIVE_INFINITY,
  leadResistance: 1000,
  lamp: { knots: genericSmallLamp, recoveryTime: 0, strikeDelay: 0 },
}
const input = {
  stage,
  solution: solveStage(stage),
  path: branchesOf(genericSmallLamp, 1000),
  kind: 'logarithmic' as const,
  x: currentAxis('logarithmic', [1e-8, 1e-2], [0, 600]),
  y: linearAxis([0, 150], [300, 0], 40),
}

describe('readings on the plane', () => {
  it('stand where the capacitor would see them, the lead resistor included', () => {
    const { dots, fit } = overlayPaths(input, {
      points: [{ current: 1e-3, voltage: 60 }],
      knots: null,
    })
    // 1 mA is five sixths along six decades; 60 V and 1 V in the lead are 61 of 150.
    expect(dots).toBe('M500.0 178.0h0')
    expect(fit).toBe('')
  })

  it('keep a current below zero at the left end of a logarithmic axis', () => {
    const { dots } = overlayPaths(input, { points: [{ current: -2e-9, voltage: 30 }], knots: null })
    expect(dots).toBe('M0.0 240.0h0')
  })

  it('draw the fit through its own knots', () => {
    const { fit } = overlayPaths(input, { points: [], knots: genericSmallLamp })
    const ends = fit.match(/[ML]([\d.]+),([\d.]+)/g)?.at(-1) ?? ''
    const [, x, y] = /[ML]([\d.]+),([\d.]+)/.exec(ends) ?? []
    expect(Number(x)).toBeCloseTo(input.x.place(8e-3), 1)
    expect(Number(y)).toBeCloseTo(input.y.place(84 + 8), 1)
  })
})
