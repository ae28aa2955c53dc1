import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readSweep, type SweepTableOptions } from '../../src/io/sweepTable'
import { writeSweep } from '../../src/io/sweepWrite'

async function read(text: string, options: SweepTableOptions = {}) {
  const table = await readSweep(text, options)
  if (!table.ok) throw new Error(table.message)
  return table
}

async function valuesOf(text: string, options: SweepTableOptions = {}) {
  return (await read(text, options)).readings.map(({ supply, lamp }) => [supply, lamp])
}

const expected = [
  [10, 9.5],
  [90.5, 60.25],
]

describe('a sweep read from text', () => {
  it.each([
    ['commas', '10,9.5\n90.5,60.25'],
    ['commas and gaps', '10, 9.5\n90.5, 60.25\n'],
    ['semicolons and decimal commas', '10;9,5\n90,5;60,25'],
    ['tabs and decimal commas', '10\t9,5\n90,5\t60,25'],
    ['tabs and points, with carriage returns', '10\t9.5\r\n90.5\t60.25\r\n'],
    ['spaces', '10   9.5\n  90.5 60.25'],
    ['spaces and decimal commas', '10 9,5\n90,5 60,25'],
    ['quotes', '"10","9,5"\n"90,5","60,25"'],
    ['units in the cells', '10 V;9500 mV\n90.5 V;60.25 V'],
    ['a mark at the start of the file', '\uFEFF10,9.5\n90.5,60.25'],
  ])('understands %s', async (_, text) => {
    expect(await valuesOf(text)).toEqual(expected)
  })

  it('takes names and units from a header', async () => {
    const table = await read('Lamp (mV);Supply [V];Sweep\n9500;10;up\n60250;90,5;down')
    expect(table.readings).toEqual([
      { supply: 10, lamp: 9.5, row: 2, direction: 'up' },
      { supply: 90.5, lamp: 60.25, row: 3, direction: 'down' },
    ])
    expect(table.columns.map(({ role }) => role)).toEqual(['lamp', 'supply', 'direction'])
  })

  it('passes over a column that counts the rows, and one of another unit', async () => {
    expect(await valuesOf('1,10,9.5\n2,90.5,60.25\n3,100,61')).toEqual([...expected, [100, 61]])
    expect(await valuesOf('Current (mA),Supply,Lamp\n3,10,9.5\n4,90.5,60.25')).toEqual(expected)
  })

  it('takes the columns and units that are chosen instead', async () => {
    const options = { supplyColumn: 2, lampColumn: 0, supplyUnit: 1e-3 }
    expect(await valuesOf('9.5,7,10000\n60.25,8,90500', options)).toEqual(expected)
  })

  it('tells what it could not read, where it stands, and goes on', async () => {
    const table = await read('# bench\nSupply,Lamp\n10,9.5\nninety,60\n\n90.5,\n90.5,60.25\n7')
    expect(table.readings.map(({ row }) => row)).toEqual([3, 7])
    expect(table.errors.map(({ row, text, kept }) => [row, text, kept])).toEqual([
      [4, 'ninety', false],
      [6, '', false],
      [8, '', false],
    ])
    expect(table.errors[0]?.message).toBe('“ninety” in “Supply” is no voltage.')
    expect(table.remarks).toEqual([{ row: 1, text: '# bench' }])
    expect(table.preview.map(({ row, reading }) => [row, reading !== null])).toEqual([
      [3, true],
      [4, false],
      [6, false],
      [7, true],
      [8, false],
    ])
  })

  it('keeps a row whose direction it does not know, and says so', async () => {
    const table = await read('10,9.5,up\n90.5,60.25,sideways')
    expect(table.readings[1]).toEqual({ supply: 90.5, lamp: 60.25, row: 2 })
    expect(table.errors[0]).toMatchObject({ row: 2, text: 'sideways', kept: true })
  })

  it.each([
    ['', /nothing/],
    ['\n\n  \n', /nothing/],
    ['hello\nthere', /Two columns/],
    ['10\n20\n30', /Two columns/],
    ['10,5,9,8\n20,5,19,8', /both separate columns and mark decimals/],
  ])('refuses %j in a sentence', async (text, words) => {
    const table = await readSweep(text)
    expect(table.ok ? '' : table.message).toMatch(words)
  })

  it('accounts for every line of anything', async () => {
    const line = fc.oneof(
      fc.constantFrom('', '# note', '10,9.5', '20,19', 'a,b', '30', '1;2', '"', 'up,1,2'),
      fc.string({ maxLength: 12 }).map((text) => text.replace(/[\r\n"]/g, ' ')),
    )
    await fc.assert(
      fc.asyncProperty(fc.array(line, { maxLength: 30 }), async (lines) => {
        const text = lines.map((one) => one.replaceAll('"', '')).join('\n')
        const table = await readSweep(text, { delimiter: ',', header: false })
        if (!table.ok) return
        const rows = [
          ...table.readings.map(({ row }) => row),
          ...table.errors.map(({ row }) => row),
          ...table.remarks.map(({ row }) => row),
        ]
        const filled = text
          .replace(/^\uFEFF/, '')
          .split('\n')
          .flatMap((one, i) => (one.replaceAll(',', '').trim() === '' ? [] : [i + 1]))
        expect(new Set(rows)).toEqual(new Set(filled))
      }),
      { seed: 41 },
    )
  })

  it('reads 10⁵ rows and their numbers', async () => {
    const text = Array.from({ length: 1e5 }, (_, i) => `${i / 1000};${i / 2000}`).join('\n')
    const table = await read(text.replaceAll('.', ','))
    expect(table.readings).toHaveLength(1e5)
    expect(table.readings.at(-1)).toEqual({ supply: 99.999, lamp: 49.9995, row: 1e5 })
  })
})

describe('a sweep written', () => {
  const volts = fc.double({ min: -1e4, max: 1e4, noNaN: true }).map((value) => value + 0)

  it('reads back the same, with how it was taken', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(
          fc.record(
            { supply: volts, lamp: volts, direction: fc.constantFrom('up', 'down') },
            { requiredKeys: ['supply', 'lamp'] },
          ),
          { minLength: 1, maxLength: 30 },
        ),
        fc.constantFrom('lamp', 'supply', 'resistor'),
        fc.constantFrom(1e6, 10e6, Number.POSITIVE_INFINITY),
        async (readings, meterPlace, meterResistance) => {
          const setup = { seriesResistance: 47e3, meterResistance, meterPlace } as const
          const table = await read(writeSweep(readings as never, setup))
          expect(table.setup).toEqual(setup)
          expect(table.errors).toEqual([])
          expect(table.readings.map(({ row: _, ...rest }) => rest)).toEqual(readings)
        },
      ),
      { seed: 42 },
    )
  })
})
