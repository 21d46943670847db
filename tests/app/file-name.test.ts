import { expect, test } from 'vitest'
import { downloadAs } from '@/app/_server/file-name'

/** RFC 6266: `filename` for old readers, `filename*` (RFC 8187) for the others. */
test.each([
  ['Heron Slough', 'Heron Slough', 'Heron%20Slough'],
  ['Gewächshaus Süd', 'Gewachshaus Sud', 'Gew%C3%A4chshaus%20S%C3%BCd'],
  ['חממה', 'workbook', '%D7%97%D7%9E%D7%9E%D7%94'],
  ['☀ house', 'house', '%E2%98%80%20house'],
  ['../../etc/passwd', 'etc passwd', 'etc%20passwd'],
  ['a\r\nset-cookie: x=1', 'a set-cookie x=1', 'a%20set-cookie%20x%3D1'],
  ['6" beds; 50% off', '6 beds 50 off', '6%20beds%3B%2050%25%20off'],
  ["Owner's (new)*", 'Owners (new)', 'Owner%27s%20%28new%29'],
  ['.', 'workbook', 'workbook'],
  ['\ud800', 'workbook', 'workbook'],
])('%j is saved under its own name', (title, plain, encoded) => {
  expect(downloadAs(title, 'xlsx')).toBe(
    `attachment; filename="${plain}.xlsx"; filename*=UTF-8''${encoded}.xlsx`,
  )
})

test('a very long title is cut between two characters', () => {
  const header = downloadAs('🏡'.repeat(200), 'xlsx')
  expect(header).toContain(encodeURIComponent('🏡'.repeat(120)))
  expect(header).not.toContain(encodeURIComponent('🏡'.repeat(121)))
})
