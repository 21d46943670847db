import { expect, test } from 'vitest'
import { compareRecalculated } from '../../../_support/spreadsheet'
import { xlsxBytes } from '../../../_support/xlsx-bytes'
import { sampleValues, sampleWorkbook } from './sample'

const limit = 120_000

test(
  '[X1] an exported workbook recalculates to its own values, and what does not is noticed',
  async () => {
    const { workbook, values } = sampleWorkbook()
    // Cached values in this file are all wrong, so agreement shows that they were computed anew.
    const wrongCache = sampleValues(workbook, {
      'frame B4': 1,
      'frame B5': 2,
      'frame C3': 'no',
      'frame C7': true,
    })
    const wrongValues = sampleValues(workbook, { 'frame B4': 500.000001, 'frame C3': 'Wide' })
    const broken = sampleWorkbook()
    broken.workbook.sheets[0]?.rows.push([undefined, { input: '=1/0' }], [{ input: '=no_such_name+1' }])
    const brokenValues = sampleValues(broken.workbook, {
      'frame B8': { error: '#DIV/0!', text: 'divided by 0' },
      'frame A9': 1,
    })
    const { differences, formulas } = await compareRecalculated([
      { name: 'right', bytes: await xlsxBytes(workbook, values), workbook, values },
      { name: 'wrong cache', bytes: await xlsxBytes(workbook, wrongCache), workbook, values },
      { name: 'wrong values', bytes: await xlsxBytes(workbook, values), workbook, values: wrongValues },
      {
        name: 'broken',
        bytes: await xlsxBytes(broken.workbook, brokenValues),
        workbook: broken.workbook,
        values: brokenValues,
      },
    ])
    expect(differences.map((one) => `${one.file}: ${one.address}`)).toEqual([
      'wrong values: Frame!C3',
      'wrong values: Frame!B4',
      'broken: Frame!B8',
      'broken: Frame!A9',
    ])
    expect(formulas).toBe(6 * 4 + 2)
  },
  limit,
)
