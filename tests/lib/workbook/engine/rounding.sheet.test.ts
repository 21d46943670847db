import ExcelJS from 'exceljs'
import { expect, test } from 'vitest'
import { recalculated } from '../../../_support/spreadsheet'
import { known, roundingCases } from './rounding-cases'

test('[E1 E2] LibreOffice Calc gives the values of the table, and the known differences are still there', async () => {
  const all = [...roundingCases, ...known.map(([formula, , theirs]) => [formula, theirs] as const)]
  const workbook = new ExcelJS.Workbook()
  const sheet = workbook.addWorksheet('Sums')
  all.forEach(([formula], index) => {
    sheet.getCell(index + 1, 1).value = { formula }
  })
  const [computed] = await recalculated([Buffer.from(await workbook.xlsx.writeBuffer())])
  const values = all.map((_, index) => computed?.getWorksheet('Sums')?.getCell(index + 1, 1).result)
  all.forEach(([formula, expected], index) => {
    expect(Number(values[index]), formula).toBeCloseTo(expected, 9)
  })
})
