import { describe, expect, test } from 'vitest'
import { columnName } from '@/lib/workbook/address'
import { absoluteRange, definedNames } from '@/lib/workbook/xlsx/addresses'
import { pixelsToCharacters } from '@/lib/workbook/xlsx/column-widths'
import { fileFormula } from '@/lib/workbook/xlsx/formula-text'

describe('[X1] formulas of the file', () => {
  test.each([
    ['=1+A1', '1+A1'],
    ['=IFS(A1>0,1,TRUE(),2)', '_xlfn.IFS(A1>0,1,TRUE(),2)'],
    ['=ifna (B1,0)+SUM(A1)', '_xlfn.ifna (B1,0)+SUM(A1)'],
    ['="IFS("&\'IFS(x)\'!A1', '"IFS("&\'IFS(x)\'!A1'],
    ['="say ""IFS("" "&CONCAT(A1:A3)', '"say ""IFS("" "&_xlfn.CONCAT(A1:A3)'],
    ['=MYIFS(1)+VAR.S(A1:A2)', 'MYIFS(1)+_xlfn.VAR.S(A1:A2)'],
    ['=COVARIANCE.P(A1:A2,B1:B2)', '_xlfn.COVARIANCE.P(A1:A2,B1:B2)'],
  ])('[X1] %s', (input, formula) => {
    expect(fileFormula(input)).toBe(formula)
  })
})

describe('[X4] addresses', () => {
  test.each([
    [0, 'A'],
    [25, 'Z'],
    [26, 'AA'],
    [255, 'IV'],
    [701, 'ZZ'],
    [702, 'AAA'],
  ])('[X4] column %d is %s', (column, letters) => {
    expect(columnName(column)).toBe(letters)
  })

  test('[X4] ranges are absolute, their sheet quoted', () => {
    const area = { sheet: 's', row: 1, column: 0, rowCount: 1, columnCount: 1 }
    expect(absoluteRange(area, 'Take-off')).toBe("'Take-off'!$A$2")
    expect(absoluteRange({ ...area, rowCount: 3, columnCount: 2 }, "A'b")).toBe("'A''b'!$A$2:$B$4")
  })

  test.each([
    ['fan10', false],
    ['xfd1', false],
    ['xfe1', true],
    ['abc0', true],
    ['abc1048577', true],
    ['r', false],
    ['c1', false],
    ['r1c1', false],
    ['rate', true],
    ['u_value', true],
  ])('[X4] whether %s can be a name of the file: %s', (name, can) => {
    const area = { sheet: 's', row: 0, column: 0, rowCount: 1, columnCount: 1 }
    const named = { name, area, quantity: 'number', role: 'result' } as const
    expect(definedNames([named], new Map([['s', 'S']])).length).toBe(can ? 1 : 0)
    expect(definedNames([named], new Map())).toEqual([])
  })
})

test('[X3] widths in characters', () => {
  expect(pixelsToCharacters(96)).toBe(13)
  expect(pixelsToCharacters(1)).toBe(1)
})
