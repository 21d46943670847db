import { expect, test } from 'vitest'
import { safeNext } from '@/app/_server/safe-next'

test.each([
  ['/workbooks', '/workbooks'],
  ['/workbooks/5f0c?sheet=heat#b4', '/workbooks/5f0c?sheet=heat#b4'],
  ['/', '/'],
])('%s is where the person goes on to', (next, path) => {
  expect(safeNext(next)).toBe(path)
})

test.each([
  ['//evil.example/'],
  ['///evil.example'],
  ['/\\evil.example'],
  ['\\\\evil.example'],
  ['/\t/evil.example'],
  ['/\n/evil.example'],
  ['/./ /../..//evil.example'],
  ['/.//evil.example'],
  ['https://evil.example'],
  ['javascript:alert(1)'],
  ['workbooks'],
  [' /workbooks'],
  [''],
  [undefined],
  [['/workbooks']],
  [7],
])('%j is not followed', (next) => {
  expect(safeNext(next)).toBe('/workbooks')
})
