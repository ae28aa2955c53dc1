import { beforeEach, describe, expect, it } from 'vitest'
import { catalogueEntry, recordOf } from '../../src/core'
import type { LampStore } from '../../src/io/lampStore'
import { memoryLampStore } from '../../src/io/lampStoreMemory'
import { lampKeeper, myLampsStore } from '../../src/state/myLamps'

const entry = catalogueEntry('A1A')
if (entry === null) throw new Error('A1A is missing')
const lamp = recordOf(entry)

let count = 0
const newId = () => `lamp-${++count}`
const names = () => myLampsStore.getState().lamps.map((kept) => kept.lamp.name)

beforeEach(() => {
  count = 0
  myLampsStore.setState({ lamps: [], damaged: [], read: false, trouble: null, removed: [] })
})

describe('one’s own lamps', () => {
  it('are kept, listed, copied under a name of their own, and renamed', async () => {
    const keeper = lampKeeper(memoryLampStore(), newId)
    await keeper.keep(lamp)
    const first = myLampsStore.getState().lamps[0]!
    await keeper.duplicate(first)
    expect(names()).toEqual([lamp.name, `${lamp.name} (2)`])
    await keeper.change({ ...first, lamp: { ...lamp, name: 'Bench lamp' } })
    expect(names()).toContain('Bench lamp')
  })

  it('come back when removed by mistake, the last one first', async () => {
    const store = memoryLampStore()
    const keeper = lampKeeper(store, newId)
    await keeper.keep(lamp)
    await keeper.keep({ ...lamp, name: 'Second' })
    for (const kept of [...myLampsStore.getState().lamps]) await keeper.remove(kept)
    expect(names()).toEqual([])
    await keeper.bringBack()
    expect(names()).toHaveLength(1)
    await keeper.bringBack()
    expect(names()).toHaveLength(2)
    expect(await keeper.bringBack()).toBe(false)
    const list = await store.list()
    expect(list.ok && list.lamps).toHaveLength(2)
  })

  it('stay on screen, with a sentence, where the browser cannot keep them', async () => {
    const full: LampStore = {
      ...memoryLampStore(),
      put: async () => ({ ok: false, message: 'The lamp was not kept: storage is full.' }),
    }
    const keeper = lampKeeper(full, newId)
    expect(await keeper.keep(lamp)).toBe(false)
    expect(names()).toEqual([lamp.name])
    expect(myLampsStore.getState().trouble).toContain('storage is full')
  })

  it('are not put back to what they were by an answer that comes late', async () => {
    const store = memoryLampStore()
    const empty = await store.list()
    const waiting: ((list: typeof empty) => void)[] = []
    let calls = 0
    const slow: LampStore = {
      ...store,
      list: () => (++calls === 1 ? new Promise((resolve) => waiting.push(resolve)) : store.list()),
    }
    const keeper = lampKeeper(slow, newId)
    const first = keeper.refresh()
    await keeper.keep(lamp)
    waiting[0]?.(empty)
    await first
    expect(names()).toEqual([lamp.name])
  })

  it('say why where they cannot be read', async () => {
    const blocked: LampStore = {
      ...memoryLampStore(),
      list: async () => ({ ok: false, message: 'Your lamps could not be read.' }),
    }
    await lampKeeper(blocked, newId).refresh()
    expect(myLampsStore.getState()).toMatchObject({
      read: true,
      trouble: 'Your lamps could not be read.',
    })
  })
})
