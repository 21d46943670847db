import { describe, expect, test } from 'vitest'
import { formulaBounds, scan } from '@/lib/workbook'
import { dropSheetInFormula, renameInFormula, shiftFormula } from '@/lib/workbook/formula/rewrite'

function tokens(formula: string): string {
  const found: string[] = []
  scan(formula, (kind, start, end) => found.push(`${kind}:${formula.slice(start, end)}`))
  return found.join(' ')
}

describe('the tokens of a formula', () => {
  test.each([
    ['=A1', 'reference:A1'],
    ['=$A$1+a1', 'reference:$A$1 operator:+ reference:a1'],
    ['=A1:B2', 'reference:A1:B2'],
    ['=A1 : B2', 'reference:A1 : B2'],
    ['=Frame!A1:B2', 'reference:Frame!A1:B2'],
    ['=Frame!A1:Frame!B2', 'reference:Frame!A1:Frame!B2'],
    ["='My sheet'!A1:B2", "reference:'My sheet'!A1:B2"],
    ["='It''s'!A1", "reference:'It''s'!A1"],
    ['=2026!A1', 'reference:2026!A1'],
    ['=SUM(A:A,$B:C)', 'function:SUM open:( reference:A:A separator:, reference:$B:C close:)'],
    ['=SUM(1:1,$2:3)', 'function:SUM open:( reference:1:1 separator:, reference:$2:3 close:)'],
    ['=LOG10(100)', 'function:LOG10 open:( number:100 close:)'],
    ['=LOG10 (100)', 'function:LOG10 space:  open:( number:100 close:)'],
    ['=width*2.5e-3', 'name:width operator:* number:2.5e-3'],
    ['=eave_height', 'name:eave_height'],
    ['=a1b', 'name:a1b'],
    ['="A1 ""quoted"" B2"&C3', 'text:"A1 ""quoted"" B2" operator:& reference:C3'],
    ['="open', 'bad:"open'],
    ['=#REF!+#N/A', 'error:#REF! operator:+ error:#N/A'],
    ['=A0', 'name:A0'],
    ['=ABCD1', 'name:ABCD1'],
    ['=A1<=B1', 'reference:A1 operator:<= reference:B1'],
    ['={1,2;3}', 'open:{ number:1 separator:, number:2 separator:; number:3 close:}'],
    ['=.5+1.', 'number:.5 operator:+ number:1.'],
    ['=1.5:3', 'number:1.5 operator:: number:3'],
    ['=A1%', 'reference:A1 operator:%'],
    ['=', ''],
  ])('%s', (formula, expected) => {
    expect(tokens(formula)).toBe(expected)
  })

  test('joined they are the text again', () => {
    for (const formula of [
      '=IF(\'a b\'!A1:C3>2, "x""y", #N/A) & $B7 ?',
      '=§ ~ \u{1F331}A1',
      "='never closed!A1",
    ]) {
      let joined = ''
      scan(formula, (_kind, start, end) => {
        joined += formula.slice(start, end)
      })
      expect(`=${joined}`).toBe(formula)
    }
  })
})

describe('references follow lines', () => {
  const insert = (at: number, count = 1) => ({ kind: 'insert', at, count }) as const
  const remove = (at: number, count = 1) => ({ kind: 'remove', at, count }) as const
  const move = (at: number, count: number, to: number) => ({ kind: 'move', at, count, to }) as const

  test.each([
    ['W1', '=A5', 'row', insert(4), '=A6'],
    ['W1', '=A5', 'row', insert(5), '=A5'],
    ['W1', '=$A$5', 'row', insert(0, 3), '=$A$8'],
    ['W1', '=B1', 'column', insert(1), '=C1'],
    ['W1', '=Z1', 'column', insert(0), '=AA1'],
    ['W2', '=A5+1', 'row', remove(4), '=#REF!+1'],
    ['W6', "='Frame'!A5", 'row', remove(4), '=#REF!'],
    ['W1', '=A5', 'row', remove(1, 2), '=A3'],
    ['W3', '=SUM(A2:A4)', 'row', insert(1), '=SUM(A3:A5)'],
    ['W3', '=SUM(A2:A4)', 'row', insert(2), '=SUM(A2:A5)'],
    ['W3', '=SUM(A2:A4)', 'row', insert(4), '=SUM(A2:A4)'],
    ['W4', '=SUM(A2:A4)', 'row', remove(1), '=SUM(A2:A3)'],
    ['W4', '=SUM(A2:A4)', 'row', remove(3, 5), '=SUM(A2:A3)'],
    ['W4', '=SUM(A2:A4)', 'row', remove(0, 3), '=SUM(A1:A1)'],
    ['W4', '=SUM(A2:A4)', 'row', remove(1, 3), '=SUM(#REF!)'],
    ['W4', '=SUM(A4:A2)', 'row', remove(1), '=SUM(A3:A2)'],
    ['W8', '=SUM(A:C)', 'row', remove(0, 9), '=SUM(A:C)'],
    ['W8', '=SUM(A:C)', 'column', insert(1), '=SUM(A:D)'],
    ['W8', '=SUM(2:3)', 'column', insert(1), '=SUM(2:3)'],
    ['W8', '=SUM(2:3)', 'row', remove(0), '=SUM(1:2)'],
    ['W1', '=A3', 'row', move(2, 1, 6), '=A6'],
    ['W1', '=A5', 'row', move(2, 1, 6), '=A4'],
    ['W1', '=A3', 'row', move(5, 2, 1), '=A5'],
    ['W5', '=SUM(A2:A3)', 'row', move(1, 2, 6), '=SUM(A5:A6)'],
    ['W5', '=SUM(A2:A6)', 'row', move(2, 1, 5), '=SUM(A2:A6)'],
    ['W5', '=SUM(A2:A6)', 'row', move(1, 1, 9), '=SUM(A2:A5)'],
    ['W5', '=SUM(A2:A6)', 'row', move(8, 1, 3), '=SUM(A2:A7)'],
    ['W7', '=Other!A5+A5', 'row', insert(0), '=Other!A5+A6'],
    ['W7', '="A5"&A5', 'row', insert(0), '="A5"&A6'],
    ['W7', '= a5 * b9', 'row', insert(6), '= a5 * B10'],
  ] as const)('[%s] %s over %s %j is %s', (_rule, formula, axis, change, expected) => {
    expect(shiftFormula(formula, 'Frame', 'Frame', axis, change).text).toBe(expected)
  })

  test.each([
    ['=Frame!A1', "='Big house'!A1"],
    ["='frame'!A1:B2", "='Big house'!A1:B2"],
    ['=FRAME!A:A', "='Big house'!A:A"],
    ['=Frames!A1+"Frame!A1"', '=Frames!A1+"Frame!A1"'],
  ])('[W9] %s renamed is %s', (formula, expected) => {
    expect(renameInFormula(formula, 'Frame', 'Big house')).toBe(expected)
  })

  test('[W6] references to a removed sheet become #REF!', () => {
    expect(dropSheetInFormula('=SUM(Frame!A1:B2)+A1+frame!C3', 'Frame')).toBe('=SUM(#REF!)+A1+#REF!')
  })
})

describe('bounds of a formula, before anything parses it', () => {
  test.each([
    [`=${'1'.repeat(8192)}`, /8193 characters; at most 8192/],
    [`=${'('.repeat(65)}1${')'.repeat(65)}`, /65 deep; at most 64/],
    [`=${'('.repeat(3000)}1`, /3000 deep/],
    [`=SUM(${Array(256).fill('1').join(',')})`, /256 arguments; at most 255/],
    [`=${Array(502).fill('1').join('+')}`, /501 operators; at most 500/],
    [`=${'-'.repeat(4000)}1`, /4000 operators/],
  ])('%.30s… is refused with words', (formula, words) => {
    expect(formulaBounds(formula)?.text).toMatch(words)
    expect(formulaBounds(formula)?.code).toBe('limit')
  })

  test.each([
    `=${'('.repeat(64)}1${')'.repeat(64)}`,
    `=SUM(${Array(255).fill('1').join(',')})`,
    `=${Array(501).fill('1').join('+')}`,
    `="${'('.repeat(3000)}"`,
  ])('%.30s… is within bounds', (formula) => {
    expect(formulaBounds(formula)).toBeUndefined()
  })
})
