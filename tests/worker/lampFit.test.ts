import { describe, expect, it } from 'vitest'
import type { SweepProgress, SweepSetup } from '../../src/core'
import { fitService } from '../../src/worker/lampFit'
import { randomLamp, seeded, sweepOf } from '../core/lamp/syntheticSweep'

const setup: SweepSetup = {
  seriesResistance: 100e3,
  meterResistance: 10e6,
  meterPlace: 'lamp',
  readingError: { absolute: 0.05, relative: 0 },
}
const readings = sweepOf(
  randomLamp(seeded(1)),
  setup,
  { to: 220, count: 200, error: 0.05 },
  seeded(2),
)
const stopped = { ok: false, stopped: true }

describe('the fitting of sweeps', () => {
  it('gives a fit and tells how far it has come', async () => {
    const heard: SweepProgress[] = []
    const outcome = await fitService().fit({ readings, setup }, (progress) => heard.push(progress))
    expect(outcome.ok && outcome.result.fit.ok).toBe(true)
    expect(heard.length).toBeGreaterThan(2)
  })

  it('lets the newest request win', async () => {
    const service = fitService()
    const [first, second] = await Promise.all([
      service.fit({ readings, setup }),
      service.fit({ readings, setup }),
    ])
    expect(first).toEqual(stopped)
    expect(second.ok).toBe(true)
  })

  it('ends a fit that is told to stop, and fits again after', async () => {
    const service = fitService()
    let heard = 0
    const running = service.fit({ readings, setup }, () => {
      heard++
      if (heard === 2) service.stop()
    })
    expect(await running).toEqual(stopped)
    expect(heard).toBe(2)
    expect((await service.fit({ readings, setup })).ok).toBe(true)
  })

  it('sends only what a worker can send', async () => {
    const outcome = await fitService().fit({ readings, setup })
    expect(structuredClone(outcome)).toEqual(outcome)
  })
})
