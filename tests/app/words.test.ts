import { expect, test } from 'vitest'
import { changedWords } from '@/app/(office)/workbooks/_list/words'

const now = new Date('2030-04-15T12:00:00Z')

test.each([
  ['2030-04-15T11:59:40Z', 'just now'],
  ['2030-04-15T12:00:09Z', 'just now'],
  ['2030-04-15T11:58:30Z', '1 minute ago'],
  ['2030-04-15T11:01:00Z', '59 minutes ago'],
  ['2030-04-15T09:30:00Z', '2 hours ago'],
  ['2030-04-14T11:00:00Z', 'yesterday'],
  ['2030-04-12T11:00:00Z', '3 days ago'],
  ['2030-03-02T11:00:00Z', '2 Mar 2030'],
])('changed at %s reads %s', (at, words) => {
  expect(changedWords(new Date(at), now)).toBe(words)
})
