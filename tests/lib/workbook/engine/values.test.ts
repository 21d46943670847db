import { describe, expect, test } from 'vitest'
import { type CellInput, type Engine, isCellError, type Operation } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { bookJson, place } from '../books'

const at = (address: string, sheet = 'frame') => ({ sheet, ...place(address) })

const set = (sheet: string, inputs: Readonly<Record<string, CellInput | null>>): Operation => ({
  kind: 'set-cells',
  sheet,
  cells: Object.entries(inputs).map(([address, input]) => ({ ...place(address), input })),
})

const shared = createEngine(
  bookJson(
    { Frame: { A1: 2, A2: 'text', A3: 5, C1: '=B1' } },
    { width: ['Frame', 0, 0], sizes: ['Frame', 0, 0, 3] },
  ),
)

function evaluate(input: CellInput): ReturnType<Engine['value']> {
  shared.apply([set('frame', { B1: input })])
  return shared.value(at('B1'))
}

describe('values', () => {
  test.each<[CellInput, unknown]>([
    ['=width*3', 6],
    ['=WIDTH', 2],
    ['=SUM(sizes)', 7],
    ['=TRUE', true],
    ['=IF(FALSE,1,2)', 2],
    ['=Z9', 0],
    ['=Z9&""', ''],
    ['="a ""b"" \\ c"', 'a "b" \\ c'],
    ['="6"""&1', '6"1'],
    ['=1E3', 1000],
    ['=SUM (1,2)', 3],
    ['=0*-1', 0],
    ['=1e-320', 0],
    ['=INT(-0.5)', -1],
    ['=TRANSPOSE(A1:A3)', 2],
    ['={7,8}', 7],
    ['=SUMPRODUCT(A1:A1,A3:A3)', 10],
    ['=VLOOKUP(5,A1:A3,1,FALSE)', 5],
    ['=DATE(1900,3,1)', 61],
  ])('[E4 E6 E10] %s is %j', (input, value) => {
    expect(evaluate(input)).toBe(value)
  })

  test.each(['12%', '2026-01-02', '$5', 'true', '#N/A', '1/2', "a'b", '12:30', '5 €'])(
    '[E5] %s stays text',
    (text) => {
      expect(evaluate(text)).toBe(text)
    },
  )

  test('[E5] the mark makes a text of what would be a formula', () => {
    expect(evaluate("'=1+1")).toBe('=1+1')
  })

  test('[E10] 12345678901.23 + 0.01 keeps its cents', () => {
    expect(evaluate('=12345678901.23+0.01')).toBe(12345678901.24)
  })
})

describe('errors in words', () => {
  test.each<[string, string, RegExp]>([
    ['=1/0', '#DIV/0!', /Divides by zero/],
    ['=FOO(1)', '#NAME?', /no function called FOO/],
    ['=INDIRECT("A1")', '#NAME?', /no function called INDIRECT/],
    ['=heigth*2', '#NAME?', /no named value called heigth/],
    ['=XFD1', '#NAME?', /XFD1 lies outside a sheet, which has at most 100000 rows and 256 columns/],
    ['=A100001', '#NAME?', /A100001 lies outside/],
    ['=Nowhere!A1', '#REF!', /no sheet called Nowhere/],
    ['=#REF!', '#REF!', /no longer there/],
    ['=A2+1', '#VALUE!', /text stands where a number/],
    ['=A1:A3', '#VALUE!', /One cell is expected/],
    ['=SUM(', '#ERROR!', /brackets, commas and quotes/],
    ['=VLOOKUP(9,A1:A3,1,FALSE)', '#N/A', /not in the table/],
    ['=SUM()', '#N/A', /too few or too many arguments/],
    ['=SQRT(-1)', '#NUM!', /no number/],
    ['=1E300*1E300', '#NUM!', /too large/],
    ['=REPT("x",10000000)', '#VALUE!', /too long/],
  ])('[E10] %s is %s', (input, error, words) => {
    const value = evaluate(input)
    expect(isCellError(value) && value.error).toBe(error)
    expect(isCellError(value) && value.text).toMatch(words)
  })

  test.each<[string, string, RegExp]>([
    ['a sum of 20,000 terms', `=${Array(20_000).fill('1').join('+')}`, /40000 characters; at most 8192/],
    ['3,000 brackets', `=${'('.repeat(3000)}1${')'.repeat(3000)}`, /3000 deep; at most 64/],
    ['300 arguments', `=SUM(${Array(300).fill('1').join(',')})`, /300 arguments; at most 255/],
    ['4,000 signs', `=${'-'.repeat(4000)}1`, /4000 operators; at most 500/],
  ])('[E7] a stored workbook with %s opens and says what is wrong', (_what, input, words) => {
    const engine = createEngine(bookJson({ Frame: { A1: input, A2: '=1+1', A3: '=A1' } }))
    expect(engine.value(at('A1'))).toMatchObject({ error: '#N/A', text: expect.stringMatching(words) })
    expect(engine.value(at('A2'))).toBe(2)
    expect(engine.value(at('A3'))).toMatchObject({ error: '#N/A' })
  })

  test('[E10] a circle names its cells, over sheets too, and the rest still computes', () => {
    const engine = createEngine(
      bookJson({
        Frame: { A1: "='Price list'!B2", A2: '=A1', A3: 4, A4: '=A3*2', D1: '=D1' },
        'Price list': { B2: '=Frame!A2+1' },
      }),
    )
    const circle = engine.value(at('A1'))
    expect(circle).toEqual({
      error: '#CYCLE!',
      text: 'The formula depends on its own result: Frame A1 → Price list B2 → Frame A2 → A1.',
    })
    expect(engine.value(at('D1'))).toMatchObject({
      text: 'The formula depends on its own result: Frame D1 → D1.',
    })
    expect(engine.value(at('A4'))).toBe(8)
  })

  test('[E10] a circle of 5,000 cells is found in short time', () => {
    const inputs: Record<string, CellInput> = { A1: '=A5000' }
    for (let row = 2; row <= 5000; row += 1) inputs[`A${row}`] = `=A${row - 1}+1`
    const engine = createEngine(bookJson({ Frame: inputs }))
    const { errors } = engine.all()
    expect(errors).toHaveLength(5000)
    expect(errors[0]?.error).toBe('#CYCLE!')
  }, 30_000)

  test.each([
    '=A#&A#',
    '=CONCATENATE(A#,A#)',
    '=SUBSTITUTE(A#,"x","xx")',
    '=TEXTJOIN("",TRUE,A#,A#)',
    '=REPLACE(A#,1,0,A#)',
  ])('[E3] a text that doubles from cell to cell by %s ends in words, and the rest computes', (formula) => {
    const inputs: Record<string, CellInput> = { A1: 'xxxxxxxxxxxxxxxx', B1: '=1+1' }
    for (let row = 2; row <= 60; row += 1) inputs[`A${row}`] = formula.replaceAll('#', String(row - 1))
    const engine = createEngine(bookJson({ Frame: inputs }))
    expect(engine.value(at('A11'))).toHaveLength(16 * 2 ** 10)
    expect(engine.value(at('A60'))).toEqual({ error: '#VALUE!', text: 'The text would be too long.' })
    expect(engine.value(at('B1'))).toBe(2)
  })
})

describe('trying out', () => {
  const json = bookJson(
    { Frame: { A1: 2, B1: '=A1*10', C1: '=B1+1' } },
    { width: ['Frame', 0, 0], area: ['Frame', 0, 1], both: ['Frame', 0, 1, 1, 2] },
  )

  test('[E11] says what named values would be and leaves everything as it was', () => {
    const engine = createEngine(json)
    const insert: Operation = { kind: 'insert-lines', sheet: 'frame', axis: 'row', at: 0, count: 2 }
    const tried = engine.tryOut([insert, set('frame', { A3: 7 })], ['area', 'both', 'nothing'])
    expect(tried).toEqual({ area: [70], both: [70, 71] })
    expect(engine.named('area')).toEqual([20])
    expect(engine.named('nothing')).toBeUndefined()
    expect(engine.apply([set('frame', { A1: 3 })]).numbers).toHaveLength(3)
    expect(engine.named('both')).toEqual([30, 31])
  })

  test('[E11] of what is refused nothing is said, and nothing stays', () => {
    const engine = createEngine(json)
    const gone: Operation = { kind: 'remove-sheet', sheet: 'frame' }
    expect(engine.tryOut([set('frame', { A1: 9 }), gone], ['area'])).toEqual({})
    expect(engine.named('area')).toEqual([20])
  })
})

test('[E11] a hundred edits of one cell among 20,000 leave the last value', () => {
  const inputs: Record<string, CellInput> = {}
  for (let row = 1; row <= 20_000; row += 1) inputs[`A${row}`] = row
  const engine = createEngine(bookJson({ Frame: { ...inputs, B1: '=A1+1' } }))
  engine.apply([set('frame', { A1: 5 })])
  for (let round = 0; round < 100; round += 1) engine.apply([set('frame', { A1: round })])
  expect(engine.value(at('B1'))).toBe(100)
})
