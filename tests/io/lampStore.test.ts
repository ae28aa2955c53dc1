import { describe, expect, it } from 'vitest'
import type { KeptLamp, LampStore } from '../../src/io/lampStore'
import { browserLampStore } from '../../src/io/lampStoreBrowser'
import { memoryLampStore } from '../../src/io/lampStoreMemory'
import { sweptLamp } from './any-lamp'
import { simpleDatabase } from './simple-database'

const kept = (id: string, name: string): KeptLamp => ({ id, lamp: { ...sweptLamp, name } })

async function namesIn(store: LampStore): Promise<string[]> {
  const list = await store.list()
  if (!list.ok) throw new Error(list.message)
  return list.lamps.map(({ lamp }) => lamp.name)
}

const damagedEntries = [
  { id: 'cut', text: '{"format":1,"lam' },
  { id: 'newer', text: '{"format":7,"lamp":{}}' },
]

type Beginning = readonly { readonly id: string; readonly text: string }[]
const stores: readonly (readonly [string, (begins: Beginning) => LampStore])[] = [
  ['in memory', (begins) => memoryLampStore(begins)],
  [
    'in the browser',
    (begins) => {
      const database = simpleDatabase(begins)
      return browserLampStore(() => database.factory)
    },
  ],
]

describe.each(stores)('my lamps %s', (_, make) => {
  it('are none at first', async () => {
    expect(await make([]).list()).toEqual({ ok: true, lamps: [], damaged: [] })
  })

  it('come back as they were, in the order a reader expects', async () => {
    const store = make([])
    for (const lamp of [kept('a', 'No. 10'), kept('b', 'no. 2'), kept('c', 'Attic')]) {
      expect(await store.put(lamp)).toEqual({ ok: true })
    }
    expect(await namesIn(store)).toEqual(['Attic', 'no. 2', 'No. 10'])
    const list = await store.list()
    expect(list.ok && list.lamps[0]).toStrictEqual(kept('c', 'Attic'))
  })

  it('are renamed under their id, and removed and put back the same', async () => {
    const store = make([])
    await store.put(kept('a', 'Pier'))
    await store.put(kept('a', 'Pier, north'))
    expect(await namesIn(store)).toEqual(['Pier, north'])
    expect(await store.remove('a')).toEqual({ ok: true })
    expect(await store.remove('a')).toEqual({ ok: true })
    expect(await namesIn(store)).toEqual([])
    await store.put(kept('a', 'Pier, north'))
    const list = await store.list()
    expect(list.ok && list.lamps).toStrictEqual([kept('a', 'Pier, north')])
  })

  it('are replaced all together, or not at all', async () => {
    const store = make([])
    await store.put(kept('a', 'Pier'))
    const broken = { id: 'c', lamp: { ...sweptLamp, recoveryTime: -1 } }
    expect(await store.replaceAll([kept('b', 'Shed'), broken])).toMatchObject({ ok: false })
    expect(await namesIn(store)).toEqual(['Pier'])
    expect(await store.replaceAll([kept('b', 'Shed'), kept('d', 'Attic')])).toEqual({ ok: true })
    expect(await namesIn(store)).toEqual(['Attic', 'Shed'])
  })

  it('are not kept where they could not be read again, or without a proper id', async () => {
    const store = make([])
    expect(await store.put({ ...kept('a', 'Pier'), id: 'No/Id' })).toMatchObject({ ok: false })
    const broken = { id: 'a', lamp: { ...sweptLamp, strikeDelay: Number.NaN } }
    expect(await store.put(broken)).toMatchObject({
      ok: false,
      message: expect.stringContaining('strike delay'),
    })
    expect(await namesIn(store)).toEqual([])
  })

  it('that are damaged are named, kept as they are, and can be removed', async () => {
    const store = make(damagedEntries)
    await store.put(kept('a', 'Pier'))
    await store.replaceAll([kept('b', 'Shed')])
    const list = await store.list()
    if (!list.ok) throw new Error(list.message)
    expect(list.lamps).toStrictEqual([kept('b', 'Shed')])
    expect(list.damaged.map(({ id, text }) => ({ id, text }))).toEqual(damagedEntries)
    expect(list.damaged[0]!.message).toContain('damaged')
    expect(list.damaged[1]!.message).toContain('newer Glowloop')
    await store.remove('cut')
    expect(await store.list()).toMatchObject({ damaged: [{ id: 'newer' }] })
  })
})

describe('the browser’s storage', () => {
  it('that is full says so, and keeps what it had', async () => {
    const database = simpleDatabase([])
    const store = browserLampStore(() => database.factory)
    await store.put(kept('a', 'Pier'))
    database.failWrites(new DOMException('quota', 'QuotaExceededError'))
    for (const trial of [store.put(kept('b', 'Shed')), store.replaceAll([kept('b', 'Shed')])]) {
      expect(await trial).toEqual({
        ok: false,
        message: expect.stringMatching(/not kept: .* is full\..*still there: save/),
        detail: 'QuotaExceededError: quota',
      })
    }
    expect(await namesIn(store)).toEqual(['Pier'])
  })

  it('that is blocked says so, for reading and for writing', async () => {
    const store = browserLampStore(() => {
      throw new DOMException('The operation is insecure.', 'SecurityError')
    })
    expect(await store.list()).toMatchObject({
      ok: false,
      message: expect.stringContaining('could not be read: the browser does not let'),
    })
    expect(await store.put(kept('a', 'Pier'))).toMatchObject({ ok: false })
    expect(await store.remove('a')).toMatchObject({ ok: false })
  })

  it.each([
    ['VersionError', 'newer Glowloop'],
    ['UnknownError', 'damaged'],
    ['InvalidStateError', 'blocks its storage'],
    ['Strange', 'does not work'],
  ])('that fails to open with %s says so', async (name, words) => {
    const database = simpleDatabase([])
    database.failOpening(new DOMException('no', name))
    const list = await browserLampStore(() => database.factory).list()
    expect(!list.ok && list.message).toContain(words)
  })

  it('is not there at all in some places', async () => {
    const store = browserLampStore(() => undefined as unknown as IDBFactory)
    expect(await store.list()).toMatchObject({ ok: false })
  })

  it('is closed after each use, so that no page stands in another’s way', async () => {
    const database = simpleDatabase([])
    const store = browserLampStore(() => database.factory)
    await store.put(kept('a', 'Pier'))
    await store.list()
    database.failWrites(new DOMException('quota', 'QuotaExceededError'))
    await store.put(kept('b', 'Shed'))
    expect(database.opened()).toBe(3)
    expect(database.closed()).toBe(3)
  })
})
