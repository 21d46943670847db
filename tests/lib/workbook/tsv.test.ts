import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { parseTsv, toTsv } from '@/lib/workbook'

describe('tab-separated text', () => {
  test.each([
    [
      'a\tb\nc\td',
      [
        ['a', 'b'],
        ['c', 'd'],
      ],
    ],
    [
      'a\tb\r\nc\td\r\n',
      [
        ['a', 'b'],
        ['c', 'd'],
      ],
    ],
    ['a\n', [['a']]],
    ['a\n\n', [['a'], ['']]],
    ['', []],
    ['\n', []],
    ['\t', [['', '']]],
    ['a\t', [['a', '']]],
    ['"a\tb"\tc', [['a\tb', 'c']]],
    ['"two\nlines"\tc\nd', [['two\nlines', 'c'], ['d']]],
    ['"say ""hi"""', [['say "hi"']]],
    ['12\' 6"\t5', [['12\' 6"', '5']]],
    ['"never closed\tx', [['"never closed', 'x']]],
    ['"x" y\tz', [['"x" y', 'z']]],
    ['a\rb', [['a'], ['b']]],
  ])('[W25 W26] %j reads as %j', (text, rows) => {
    expect(parseTsv(text)).toEqual(rows)
  })

  test('[W25 W26] what is written reads back', () => {
    const cell = fc.oneof(fc.string(), fc.constantFrom('"', 'a"b', '\t', 'x\ny', '6"', '""'))
    fc.assert(
      fc.property(
        fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 4 }),
        (rows) => {
          const wanted = rows.map((row) => [...row.slice(0, -1), 'end'])
          expect(parseTsv(toTsv(wanted))).toEqual(wanted)
          expect(parseTsv(`${toTsv(wanted)}\n`)).toEqual(wanted)
        },
      ),
    )
  })
})
