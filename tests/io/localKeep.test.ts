import { describe, expect, it } from 'vitest'
import {
  keepDesign,
  keepKey,
  lazyStore,
  restoreDesign,
  type TextStore,
} from '../../src/io/localKeep'
import { benchDesign } from './any-design'

function memoryStore(): TextStore & { readonly texts: Map<string, string> } {
  const texts = new Map<string, string>()
  return {
    texts,
    getItem: (key) => texts.get(key) ?? null,
    setItem: (key, text) => {
      texts.set(key, text)
    },
  }
}

const blocked = lazyStore(() => {
  throw new Error('The operation is insecure.')
})

describe('what the browser keeps', () => {
  it('comes back as it was, under one name', () => {
    const store = memoryStore()
    expect(restoreDesign(store)).toBeNull()
    expect(keepDesign(store, benchDesign)).toEqual({ ok: true })
    expect([...store.texts.keys()]).toEqual([keepKey])
    expect(keepKey).toBe('glowloop.design')
    expect(restoreDesign(store)).toStrictEqual({ ok: true, design: benchDesign, notes: [] })
  })

  it('works through a store that is opened only when used', () => {
    const store = memoryStore()
    expect(
      keepDesign(
        lazyStore(() => store),
        benchDesign,
      ),
    ).toEqual({ ok: true })
    expect(restoreDesign(lazyStore(() => store))).toMatchObject({ ok: true })
  })

  it('says so when storage is full', () => {
    const full: TextStore = {
      getItem: () => null,
      setItem: () => {
        throw new DOMException('quota', 'QuotaExceededError')
      },
    }
    expect(keepDesign(full, benchDesign)).toEqual({
      ok: false,
      message: expect.stringContaining('full or blocked'),
      detail: 'quota',
    })
  })

  it('says so when storage is blocked', () => {
    expect(keepDesign(blocked, benchDesign)).toMatchObject({ ok: false })
    expect(restoreDesign(blocked)).toMatchObject({
      ok: false,
      detail: 'The operation is insecure.',
    })
  })

  it('does not replace what was kept by a design that cannot be opened again', () => {
    const store = memoryStore()
    keepDesign(store, benchDesign)
    const stage = { ...benchDesign.stage, supplyVoltage: Number.NaN }
    expect(keepDesign(store, { ...benchDesign, stage })).toMatchObject({ ok: false })
    expect(restoreDesign(store)).toMatchObject({ ok: true, design: benchDesign })
  })

  it('says so when what was kept is damaged', () => {
    const store = memoryStore()
    store.texts.set(keepKey, '{"program":"Glow')
    expect(restoreDesign(store)).toMatchObject({
      ok: false,
      message: expect.stringContaining('from the last visit could not be opened'),
    })
  })
})
